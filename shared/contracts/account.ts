import { type Static, Type } from '@sinclair/typebox';

import { RolesSchema } from './roles.ts';
import { Timestamp, Uuid, lineOfText, nullable } from './common.ts';

export const PASSWORD_LENGTH = { min: 10, max: 200 } as const;

const Email = Type.String({ format: 'email', maxLength: 254, description: 'e-mail address' });
const NewPassword = Type.String({
  minLength: PASSWORD_LENGTH.min,
  maxLength: PASSWORD_LENGTH.max,
  description: 'password',
});
const PersonName = lineOfText({ maxLength: 80, description: 'name the team sees' });
const TeamName = lineOfText({ maxLength: 80, description: 'name of the bar or team' });

export const SignUpSchema = Type.Object(
  {
    email: Email,
    name: PersonName,
    password: NewPassword,
    teamName: Type.Optional(TeamName),
    invitationToken: Type.Optional(Type.String({ minLength: 20, maxLength: 200 })),
  },
  { $id: 'SignUp', additionalProperties: false },
);
export type SignUp = Static<typeof SignUpSchema>;

/** The same answer whether or not the address already had an account. */
export const SignUpResultSchema = Type.Object(
  { next: Type.Literal('sign-in') },
  { $id: 'SignUpResult', additionalProperties: false },
);
export type SignUpResult = Static<typeof SignUpResultSchema>;

export const SignInSchema = Type.Object(
  {
    email: Email,
    password: Type.String({ minLength: 1, maxLength: PASSWORD_LENGTH.max, description: 'password' }),
  },
  { $id: 'SignIn', additionalProperties: false },
);
export type SignIn = Static<typeof SignInSchema>;

export const ChangePasswordSchema = Type.Object(
  {
    currentPassword: Type.String({ minLength: 1, maxLength: PASSWORD_LENGTH.max }),
    newPassword: NewPassword,
  },
  { $id: 'ChangePassword', additionalProperties: false },
);
export type ChangePassword = Static<typeof ChangePasswordSchema>;

export const MembershipSummarySchema = Type.Object(
  { teamId: Uuid, teamName: Type.String(), roles: RolesSchema },
  { additionalProperties: false },
);
export type MembershipSummary = Static<typeof MembershipSummarySchema>;

export const AccountSchema = Type.Object(
  {
    id: Uuid,
    email: Type.String(),
    name: Type.String(),
    teams: Type.Array(MembershipSummarySchema),
  },
  { $id: 'Account', additionalProperties: false },
);
export type Account = Static<typeof AccountSchema>;

/** What somebody holding an invitation link is told before joining. */
export const InvitationPreviewSchema = Type.Object(
  { teamName: Type.String(), roles: RolesSchema, expiresAt: Timestamp, invitedBy: nullable(Type.String()) },
  { $id: 'InvitationPreview', additionalProperties: false },
);
export type InvitationPreview = Static<typeof InvitationPreviewSchema>;
