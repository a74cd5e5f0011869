import { references, type Reference } from '@shared/references';
import { componentById, type Component } from '@shared/vle/components';
import { interactionRows } from '@shared/vle/data/interaction-rows';
import type { Method } from '@shared/vle/equilibrium';
import { vapourPressureOf, type VapourPressureRow } from '@shared/vle/vapour-pressure';

/** Where a method comes from. */
export const methodSources: Readonly<Record<Method, string>> = {
  ideal: 'Raoult’s law, y·P = x·Psat, with the vapour pressures below',
  'peng-robinson': references.peng1976,
};

/** The publication behind a key; the key itself where the list does not know it. */
export function referenceText(key: string): string {
  return key in references ? references[key as Reference] : key;
}

/** The vapour pressure row that `ideal` uses of each component. */
export function correlationsInUse(
  ids: readonly string[],
  chosen: Readonly<Record<string, string>>,
): readonly VapourPressureRow[] {
  return ids.map((id) => vapourPressureOf(id, chosen[id]).row);
}

export interface InteractionInUse {
  readonly a: Component;
  readonly b: Component;
  /** Null where none is published: it counts as zero. */
  readonly kij: number | null;
}

/** The binary interaction of each pair of the slate. */
export function interactionsInUse(ids: readonly string[]): readonly InteractionInUse[] {
  return ids.flatMap((a, i) =>
    ids.slice(i + 1).map((b) => {
      const row = interactionRows.find(([first, second]) =>
        first === a ? second === b : first === b && second === a,
      );
      return { a: componentById(a), b: componentById(b), kij: row?.[2] ?? null };
    }),
  );
}

/** Method and sources in a sentence or two, to stand under every result. */
export function provenanceWords(
  method: Method,
  ids: readonly string[],
  chosen: Readonly<Record<string, string>>,
): string {
  if (method === 'peng-robinson') {
    const isPublished = interactionsInUse(ids).some(({ kij }) => kij !== null);
    const interactions = isPublished
      ? `k_ij: ${references.knapp1982}`
      : 'no k_ij is published for these pairs, all taken as 0';
    const constants = [...new Set(ids.map((id) => referenceText(componentById(id).criticalSource)))];
    return `Peng–Robinson: ${references.peng1976}; ${interactions}; constants: ${constants.join('; ')}.`;
  }
  const bySource = new Map<string, string[]>();
  for (const row of correlationsInUse(ids, chosen)) {
    const source = referenceText(row.source);
    bySource.set(source, [...(bySource.get(source) ?? []), componentById(row.componentId).name]);
  }
  const pressures = [...bySource].map(([source, names]) => `${names.join(', ')}: ${source}`);
  return `Ideal, Raoult’s law; vapour pressures of ${pressures.join('; ')}.`;
}
