import * as z from 'zod';
import { email, role } from './common';

export const temperatureUnit = z.enum(['F', 'C']);
export type TemperatureUnit = z.infer<typeof temperatureUnit>;

export const me = z.object({
  id: z.number(),
  name: z.string(),
  email: z.string(),
  roles: z.array(role),
  businessName: z.string().nullable(),
  zone: z.string(),
  temperatureUnit,
});
export type Me = z.infer<typeof me>;

/** `GET /api/session`: who is signed in (or nobody), and whether this is the demo. */
export const sessionInfo = z.object({
  me: me.nullable(),
  demo: z.boolean(),
  circleName: z.string(),
  circleZone: z.string(),
});
export type SessionInfo = z.infer<typeof sessionInfo>;

export const signIn = z.object({
  email,
  password: z.string().min(1, 'Enter your password.').max(200, 'A password has at most 200 characters.'),
});
export type SignIn = z.input<typeof signIn>;

/** NIST SP 800-63B asks for 8 characters at least where a password is the only factor's companion; we ask for 10. */
export const newPassword = z
  .string()
  .min(10, 'Use at least 10 characters.')
  .max(200, 'Use at most 200 characters.');

/** `PUT /api/me/password`. */
export const passwordChange = z.object({
  current: z
    .string()
    .min(1, 'Enter your present password.')
    .max(200, 'A password has at most 200 characters.'),
  next: newPassword,
});
export type PasswordChange = z.infer<typeof passwordChange>;

export const resetRequest = z.object({ email });
export type ResetRequest = z.input<typeof resetRequest>;

export const accountLinkParams = z.object({ token: z.string().min(20).max(200) });
export const accountLink = z.object({
  kind: z.enum(['invitation', 'reset']),
  name: z.string(),
  email: z.string(),
});
export type AccountLink = z.infer<typeof accountLink>;
export const accountLinkUse = z.object({ password: newPassword });
export type AccountLinkUse = z.infer<typeof accountLinkUse>;

export const demoAccount = z.object({
  name: z.string(),
  email: z.string(),
  roles: z.array(role),
  about: z.string(),
});
/** `GET /api/demo`: 404 unless `DEMO=1`. */
export const demoInfo = z.object({
  accounts: z.array(demoAccount),
  password: z.string(),
  mailboxUrl: z.string().nullable(),
});
export type DemoInfo = z.infer<typeof demoInfo>;
