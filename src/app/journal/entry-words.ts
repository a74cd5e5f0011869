import type { JournalEntry } from '@shared/api/journal';
import { formatNumber } from '../ui/numbers';

/** What happened, so that "who phrase subject" reads as a sentence. */
const phrases: Readonly<Record<string, string>> = {
  'sample-entered': 'entered a sample of',
  'sample-used': 'used a sample for',
  'sample-held': 'held a sample for',
  'sample-accepted': 'accepted a held sample for',
  'sample-rejected': 'rejected a sample for',
  'note-written': 'noted on',
  'tower-created': 'set up the tower',
  'sensor-created': 'set up the sensor',
  'version-created': 'made a version of',
  'version-submitted': 'submitted a version of',
  'version-made-live': 'put a version live for',
  'version-retired': 'retired a version of',
  'source-created': 'connected the source',
  'source-lost': 'lost the source',
  'source-back': 'is connected again to the source',
  'user-created': 'added the user',
  'user-changed': 'changed the user',
  'sign-in-locked': 'locked the sign-in of',
  'setting-changed': 'changed the setting',
  'demonstration-loaded': 'loaded the demonstration of',
};

/** Kinds of subject an entry may have, in the words of the filter. */
export const subjectKinds = [
  { kind: 'sample', label: 'Samples' },
  { kind: 'note', label: 'Notes' },
  { kind: 'sensor', label: 'Sensors' },
  { kind: 'tower', label: 'Towers' },
  { kind: 'source', label: 'Sources' },
  { kind: 'user', label: 'Users' },
  { kind: 'setting', label: 'Settings' },
  { kind: 'site', label: 'Site' },
] as const;

/** The phrase for an action; one this page does not know yet is read off its name. */
export function actionPhrase(action: string): string {
  return phrases[action] ?? `${action.replaceAll('-', ' ')}:`;
}

/** Who did it; the system goes by the product's name. */
export function actorName(entry: JournalEntry): string {
  return entry.user?.name ?? 'Dewmark';
}

/** `pressureCorrection` or `correction.gate` as words. */
export function fieldWords(field: string): string {
  return field
    .replaceAll('.', ' ')
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .toLowerCase();
}

export interface ChangeTexts {
  readonly field: string;
  readonly from: string;
  readonly to: string;
  readonly unit: string;
}

type Change = JournalEntry['changes'][number];

/**
 * One change in words. Fractions are put into the person's unit; other quantities stay as they were written down, since a
 * record must not say other than what it kept.
 *
 * @param fraction a mole fraction in the person's unit
 */
export function changeTexts(
  change: Change,
  shown: {
    readonly fraction: (moleFraction: number) => string;
    readonly fractionUnit: string;
    readonly time: (t: number) => string;
  },
): ChangeTexts {
  const isFraction = change.unit === 'mol/mol';
  const isTime = change.unit === 'ms';
  const text = (value: Change['from']): string => {
    if (value === null) return 'nothing';
    if (typeof value === 'string') return value === '' ? 'nothing' : value;
    if (isFraction) return shown.fraction(value);
    return isTime ? shown.time(value) : plainNumber(value);
  };
  return {
    field: fieldWords(change.field),
    from: text(change.from),
    to: text(change.to),
    unit: isFraction ? shown.fractionUnit : isTime ? '' : (change.unit ?? ''),
  };
}

/** Six figures at most, and no zeros that say nothing. */
function plainNumber(value: number): string {
  const [, decimals = ''] = String(Number(value.toPrecision(6))).split('.');
  return String(value).includes('e') ? String(value) : formatNumber(value, decimals.length);
}
