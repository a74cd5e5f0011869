/** What a tag measures; decides how its values become K and Pa absolute. */
export const quantities = [
  'temperature',
  'pressure-gauge',
  'pressure-absolute',
  'pressure-difference',
  'flow',
  'other',
] as const;
export type Quantity = (typeof quantities)[number];
