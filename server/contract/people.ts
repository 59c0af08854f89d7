import * as z from 'zod';
import { Id, Instant, Role, optionalText, text } from './common';
import { GymDto, TimeZone } from './gyms';

/** NIST SP 800-63B-4: at least 15 characters where the password is the only factor, no composition rules. */
export const PASSWORD_MIN = 15;
export const PASSWORD_MAX = 200;

export const Email = z
  .string()
  .trim()
  .max(254)
  .pipe(z.email('Write an e-mail address, for instance you@gym.example.'));

/** Characters are counted as code points, so one emoji is one character. */
export const NewPassword = z
  .string()
  .max(PASSWORD_MAX * 4)
  .refine(
    (value) => [...value].length >= PASSWORD_MIN,
    `Use at least ${PASSWORD_MIN} characters; a few words in a row are fine.`,
  )
  .refine((value) => [...value].length <= PASSWORD_MAX, `Use at most ${PASSWORD_MAX} characters.`);

/** A calendar date, `YYYY-MM-DD`. */
export const CalendarDate = z.iso.date('Write a date as YYYY-MM-DD.');

export const UserDto = z.object({
  id: Id,
  gymId: Id,
  name: z.string(),
  email: z.string(),
  role: Role,
  active: z.boolean(),
  bornOn: z.string().nullable(),
  /** What the member trains with, in the member's own words. */
  kit: z.string().nullable(),
  /** True when the member is under 18 and no guardian's consent is recorded yet. */
  needsGuardianConsent: z.boolean(),
  guardianConsent: z.object({ guardianName: z.string(), at: Instant }).nullable(),
  createdAt: Instant,
});
export type UserDto = z.infer<typeof UserDto>;

export const SessionDto = z.object({ user: UserDto, gym: GymDto });
export type SessionDto = z.infer<typeof SessionDto>;

export const OpenGym = z
  .object({ gymName: text(80), timeZone: TimeZone, name: text(80), email: Email, password: NewPassword })
  .strict();
export const SignIn = z
  .object({ email: z.string().max(254), password: z.string().max(PASSWORD_MAX * 4) })
  .strict();
export const ForgotPassword = z.object({ email: z.string().max(254) }).strict();
export const ResetPassword = z.object({ token: z.string().min(1).max(200), password: NewPassword }).strict();

export const MeChange = z
  .object({
    name: text(80),
    kit: optionalText(300),
    currentPassword: z.string().max(PASSWORD_MAX * 4),
    password: NewPassword,
  })
  .partial()
  .strict()
  .refine((change) => change.password === undefined || change.currentPassword !== undefined, {
    message: 'Give your present password to change it.',
    path: ['currentPassword'],
  });

export const PersonChange = z.object({ role: Role, active: z.boolean() }).partial().strict();
export const GuardianConsent = z.object({ guardianName: text(120) }).strict();

export const InvitationDto = z.object({
  id: Id,
  email: z.string(),
  name: z.string(),
  role: Role,
  gymName: z.string(),
  invitedBy: z.string(),
  createdAt: Instant,
  expiresAt: Instant,
  acceptedAt: Instant.nullable(),
});
export type InvitationDto = z.infer<typeof InvitationDto>;

export const NewInvitation = z.object({ email: Email, name: text(80), role: Role }).strict();
export const AcceptInvitation = z.object({ password: NewPassword, bornOn: CalendarDate.optional() }).strict();

export const PublicSessionDto = z.object({
  id: Id,
  device: z.string(),
  createdAt: Instant,
  lastUsedAt: Instant,
  current: z.boolean(),
});
