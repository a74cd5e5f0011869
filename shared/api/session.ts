import * as z from 'zod';
import { instant } from './common';

export const sessionPath = '/api/session';

/** From least to most specialised; what each may do is in `shared/api/permissions.ts`. */
export const roles = ['operator', 'engineer', 'supervisor', 'administrator'] as const;
export const role = z.enum(roles);
export type Role = z.infer<typeof role>;

export const credentials = z.object({
  username: z.string().trim().min(1, 'Type your user name.').max(80),
  password: z.string().min(1, 'Type your password.').max(200),
});
export type Credentials = z.infer<typeof credentials>;

export const site = z.object({
  name: z.string(),
  /** IANA zone in which times are shown. */
  timeZone: z.string(),
  /** Barometric pressure [Pa], for gauge readings. */
  barometricPressure: z.number(),
  /** Whether everything shown is invented data. */
  demonstration: z.boolean(),
});
export type Site = z.infer<typeof site>;

export const user = z.object({ id: z.int(), username: z.string(), name: z.string(), role });
export type User = z.infer<typeof user>;

/** Answer to GET and POST; `user` is null when nobody is signed in. `now` is the server's clock, which screens follow. */
export const session = z.object({ user: user.nullable(), site, now: instant });
export type Session = z.infer<typeof session>;
