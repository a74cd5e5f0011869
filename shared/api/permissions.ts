import type { Role } from './session';

/** Who may do what: the table of the design, used by server routes, client guards and the menu alike. */
export const permissions = {
  look: ['operator', 'engineer', 'supervisor', 'administrator'],
  enterSamples: ['operator', 'engineer', 'supervisor', 'administrator'],
  writeNotes: ['operator', 'engineer', 'supervisor', 'administrator'],
  acknowledge: ['operator', 'engineer', 'supervisor', 'administrator'],
  decideHeldSamples: ['engineer', 'supervisor'],
  setUpSensors: ['engineer'],
  approve: ['supervisor'],
  administer: ['administrator'],
} as const satisfies Record<string, readonly Role[]>;

export type Permission = keyof typeof permissions;

export function may(role: Role, permission: Permission): boolean {
  return (permissions[permission] as readonly Role[]).includes(role);
}
