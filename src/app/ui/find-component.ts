/** What a component can be found by. */
export interface NamedComponent {
  readonly id: string;
  readonly name: string;
  /** As plants abbreviate it: `iC4`. */
  readonly short: string;
  readonly formula: string;
}

/** Other names in general use: those of systematic nomenclature, and the ones that leave the "n" away. */
const otherNames: Readonly<Record<string, readonly string[]>> = {
  ethylene: ['ethene'],
  propylene: ['propene'],
  isobutane: ['i-butane', '2-methylpropane'],
  'n-butane': ['butane', 'normal butane'],
  isobutylene: ['isobutene', 'i-butene', '2-methylpropene'],
  'trans-2-butene': ['t-2-butene', 'trans-butene-2'],
  'cis-2-butene': ['c-2-butene', 'cis-butene-2'],
  '1-butene': ['butene-1'],
  '1-3-butadiene': ['butadiene'],
  isopentane: ['i-pentane', '2-methylbutane'],
  'n-pentane': ['pentane', 'normal pentane'],
  neopentane: ['2,2-dimethylpropane'],
  '1-pentene': ['pentene-1'],
  'n-hexane': ['hexane'],
  'n-heptane': ['heptane'],
  'n-octane': ['octane'],
  cumene: ['isopropylbenzene'],
  'hydrogen-sulfide': ['hydrogen sulphide'],
};

/** Case, blanks and punctuation tell no two components apart. */
const key = (text: string) => text.toLowerCase().replace(/[^a-z0-9=]/g, '');

const namesOf = (component: NamedComponent) =>
  [component.id, component.name, component.short, ...(otherNames[component.id] ?? [])].map(key);

/** The one component a text names: by name, abbreviation, or a formula that only one has. */
export function namedComponent<T extends NamedComponent>(text: string, all: readonly T[]): T | undefined {
  const wanted = key(text);
  if (wanted === '') return undefined;
  const named = all.find((component) => namesOf(component).includes(wanted));
  if (named) return named;
  const [first, second] = all.filter(({ formula }) => key(formula) === wanted);
  return second ? undefined : first;
}

/** Components that a text may mean while it is being typed, the likeliest first. */
export function matchingComponents<T extends NamedComponent>(text: string, all: readonly T[]): readonly T[] {
  const wanted = key(text);
  if (wanted === '') return all;
  const rank = (component: T) => {
    const names = namesOf(component);
    if (names.includes(wanted)) return 0;
    if (key(component.formula) === wanted) return 1;
    if (names.some((name) => name.startsWith(wanted))) return 2;
    if (key(component.formula).startsWith(wanted)) return 3;
    return names.some((name) => name.includes(wanted)) ? 4 : 5;
  };
  return all
    .map((component) => ({ component, rank: rank(component) }))
    .filter((each) => each.rank < 5)
    .sort((a, b) => a.rank - b.rank)
    .map((each) => each.component);
}
