import type { Method } from '@shared/vle/equilibrium';
import type { VapourPressureRow } from '@shared/vle/vapour-pressure';
import type { Answer, Relation } from './desk-case';

export const methodNames: Readonly<Record<Method, string>> = {
  ideal: 'ideal (Raoult’s law)',
  'peng-robinson': 'Peng–Robinson',
};

export const answerNames: Readonly<Record<Answer, string>> = {
  flash: 'at this temperature and pressure',
  'bubble-at-pressure': 'at the bubble point of this pressure',
  'dew-at-pressure': 'at the dew point of this pressure',
  'bubble-at-temperature': 'at the bubble point of this temperature',
  'dew-at-temperature': 'at the dew point of this temperature',
};

/** What a relation's own group is called on the page. */
export const productNames: Readonly<Record<Relation, string>> = {
  dew: 'heavy group in the top product',
  bubble: 'light group in the bottom product',
};

export const equationNames: Readonly<Record<VapourPressureRow['equation'], string>> = {
  'wagner_2.5_5': 'Wagner 2.5,5',
  wagner_3_6: 'Wagner 3,6',
  dippr_101: 'DIPPR 101',
  antoine: 'Antoine',
};
