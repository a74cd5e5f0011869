import { mdiNotebookOutline, mdiScaleBalance, mdiTestTube, mdiViewDashboardOutline } from '@mdi/js';
import type { Permission } from '@shared/api/permissions';

/** One entry of the menu: a screen that exists, and the permission it takes to see it. */
export interface MenuEntry {
  readonly path: string;
  readonly label: string;
  readonly glyph: string;
  readonly permission: Permission;
  /** Addresses that count as this entry's own, besides its path. */
  readonly covers?: readonly string[];
}

export const menu: readonly MenuEntry[] = [
  {
    path: '/board',
    label: 'Board',
    glyph: mdiViewDashboardOutline,
    permission: 'look',
    covers: ['/towers'],
  },
  { path: '/samples', label: 'Samples', glyph: mdiTestTube, permission: 'look' },
  { path: '/desk', label: 'Equilibrium desk', glyph: mdiScaleBalance, permission: 'look' },
  { path: '/journal', label: 'Journal', glyph: mdiNotebookOutline, permission: 'look' },
];

/** The entry an address belongs to, or none. */
export function entryOf(url: string): MenuEntry | undefined {
  const path = url.split(/[?#]/, 1)[0] ?? '';
  return menu.find((entry) =>
    [entry.path, ...(entry.covers ?? [])].some((own) => path === own || path.startsWith(`${own}/`)),
  );
}
