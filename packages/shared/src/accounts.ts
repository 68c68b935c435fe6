import { z } from 'zod';
import { emailAddress, id, instant, optionalShortText, shortText, version } from './primitives.ts';
import { permission, role } from './roles.ts';

/** Length is counted in code points after NFC; up to 256 are kept. */
export const password = z.string().min(1, 'Enter the password.').max(1024);
export const newPassword = z
  .string()
  .transform((text) => text.normalize('NFC'))
  .refine(
    (text) => [...text].length >= 15,
    'Use at least 15 characters; a few words in a row are easy to remember.',
  )
  .refine((text) => [...text].length <= 256, 'Use at most 256 characters.');

export const signInRequest = z.strictObject({ email: emailAddress, password }).meta({ id: 'SignInRequest' });
export type SignInRequest = z.input<typeof signInRequest>;

export const sessionResponse = z
  .object({
    user: z.object({
      id,
      name: z.string(),
      email: z.string(),
      title: z.string(),
      roles: z.array(role),
      maySign: z.boolean(),
    }),
    organisation: z.object({ id, name: z.string() }),
    permissions: z.array(permission),
    csrfToken: z.string(),
    expiresAt: instant,
    /** This installation shows invented data. */
    demo: z.boolean(),
  })
  .meta({ id: 'Session' });
export type SessionResponse = z.infer<typeof sessionResponse>;

export const sessionListResponse = z
  .object({
    items: z.array(
      z.object({ id, createdAt: instant, lastSeenAt: instant, userAgent: z.string(), current: z.boolean() }),
    ),
  })
  .meta({ id: 'SessionList' });
export type SessionListResponse = z.infer<typeof sessionListResponse>;

export const changePasswordRequest = z
  .strictObject({ currentPassword: password, newPassword })
  .meta({ id: 'ChangePasswordRequest' });
export const passwordResetRequest = z
  .strictObject({ email: emailAddress })
  .meta({ id: 'PasswordResetRequest' });
export const tokenParams = z.strictObject({ token: z.string().min(20).max(200) });
export const setPasswordRequest = z.strictObject({ newPassword }).meta({ id: 'SetPasswordRequest' });
export const tokenStateResponse = z
  .object({
    kind: z.enum(['invitation', 'password-reset']),
    name: z.string(),
    email: z.string(),
    organisationName: z.string(),
  })
  .meta({ id: 'TokenState' });

export const personResponse = z
  .object({
    id,
    name: z.string(),
    email: z.string(),
    title: z.string(),
    roles: z.array(role),
    maySign: z.boolean(),
    state: z.enum(['invited', 'active', 'disabled']),
    lastSeenAt: instant.nullable(),
    version,
  })
  .meta({ id: 'Person' });
export type PersonResponse = z.infer<typeof personResponse>;
export const peopleResponse = z.object({ items: z.array(personResponse) }).meta({ id: 'People' });

export const invitePersonRequest = z
  .strictObject({
    name: shortText,
    email: emailAddress,
    title: optionalShortText.default(''),
    roles: z.array(role).min(1, 'Choose at least one role.'),
    maySign: z.boolean().default(false),
  })
  .meta({ id: 'InvitePersonRequest' });
export type InvitePersonRequest = z.input<typeof invitePersonRequest>;

export const changePersonRequest = z
  .strictObject({
    name: shortText,
    title: optionalShortText,
    roles: z.array(role).min(1, 'Choose at least one role.'),
    maySign: z.boolean(),
    disabled: z.boolean(),
  })
  .meta({ id: 'ChangePersonRequest' });
export type ChangePersonRequest = z.input<typeof changePersonRequest>;

export const demoPeopleResponse = z
  .object({
    password: z.string(),
    people: z.array(
      z.object({
        name: z.string(),
        email: z.string(),
        title: z.string(),
        organisation: z.string(),
        desk: z.string(),
      }),
    ),
  })
  .meta({ id: 'DemoPeople' });
export type DemoPeopleResponse = z.infer<typeof demoPeopleResponse>;
