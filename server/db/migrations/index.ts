import type { Migration } from '../migrate';
import { people } from './01-people';
import { plant } from './02-plant';
import { laboratory } from './03-laboratory';
import { estimates } from './04-estimates';
import { liningUp } from './05-lining-up';

/** Listed by hand: a folder listing would find nothing inside a bundle. Add at the end, never edit what has landed. */
export const migrations: readonly Migration[] = [people, plant, laboratory, estimates, liningUp];
