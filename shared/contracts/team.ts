import { type Static, Type } from '@sinclair/typebox';

import {
  CalendarDate,
  PersonRefSchema,
  Revision,
  Timestamp,
  Uuid,
  lineOfText,
  nullable,
  oneOf,
  pageOf,
  pageQueryMembers,
} from './common.ts';
import { RolesSchema } from './roles.ts';
import { STANDARD_DRINK_PLACES } from '../physics/data/standard-drinks.ts';
import { HOUSE_MEASURE_RANGES } from '../units/house-measures.ts';

/** Equivalents of the measures that the trade uses but nobody defines [mL]. */
export const HouseMeasuresSchema = Type.Object(
  {
    dashMl: Type.Number({
      minimum: HOUSE_MEASURE_RANGES.dashMl.min,
      maximum: HOUSE_MEASURE_RANGES.dashMl.max,
      description: 'one dash [mL]',
    }),
    barSpoonMl: Type.Number({
      minimum: HOUSE_MEASURE_RANGES.barSpoonMl.min,
      maximum: HOUSE_MEASURE_RANGES.barSpoonMl.max,
      description: 'one bar spoon [mL]',
    }),
    dropMl: Type.Number({
      minimum: HOUSE_MEASURE_RANGES.dropMl.min,
      maximum: HOUSE_MEASURE_RANGES.dropMl.max,
      description: 'one drop [mL]',
    }),
  },
  { additionalProperties: false },
);

const teamMembers = {
  name: lineOfText({ maxLength: 80, description: 'name of the bar or team' }),
  country: oneOf(STANDARD_DRINK_PLACES, { description: 'place whose standard drink is shown' }),
  currency: Type.String({ pattern: '^[A-Z]{3}$', description: 'ISO 4217 code used for prices' }),
  houseMeasures: HouseMeasuresSchema,
};

export const TeamSchema = Type.Object(
  { id: Uuid, revision: Revision, ...teamMembers, createdAt: Timestamp },
  { $id: 'Team', additionalProperties: false },
);
export type Team = Static<typeof TeamSchema>;

export const TeamCreateSchema = Type.Object(
  { name: teamMembers.name },
  { $id: 'TeamCreate', additionalProperties: false },
);
export type TeamCreate = Static<typeof TeamCreateSchema>;

export const TeamUpdateSchema = Type.Object(teamMembers, { $id: 'TeamUpdate', additionalProperties: false });
export type TeamUpdate = Static<typeof TeamUpdateSchema>;

export const MemberSchema = Type.Object(
  {
    id: Uuid,
    revision: Revision,
    person: PersonRefSchema,
    email: nullable(Type.String({ description: 'null for roles that do not manage the team' })),
    roles: RolesSchema,
    joinedAt: Timestamp,
  },
  { $id: 'Member', additionalProperties: false },
);
export type Member = Static<typeof MemberSchema>;

export const MemberListSchema = Type.Object(
  { items: Type.Array(MemberSchema) },
  { $id: 'MemberList', additionalProperties: false },
);
export type MemberList = Static<typeof MemberListSchema>;

export const MemberUpdateSchema = Type.Object(
  { roles: RolesSchema },
  { $id: 'MemberUpdate', additionalProperties: false },
);
export type MemberUpdate = Static<typeof MemberUpdateSchema>;

export const InvitationSchema = Type.Object(
  {
    id: Uuid,
    label: Type.String(),
    roles: RolesSchema,
    createdAt: Timestamp,
    expiresAt: Timestamp,
    createdBy: nullable(PersonRefSchema),
  },
  { $id: 'Invitation', additionalProperties: false },
);
export type Invitation = Static<typeof InvitationSchema>;

export const InvitationListSchema = Type.Object(
  { items: Type.Array(InvitationSchema) },
  { $id: 'InvitationList', additionalProperties: false },
);
export type InvitationList = Static<typeof InvitationListSchema>;

export const InvitationCreateSchema = Type.Object(
  {
    label: lineOfText({ maxLength: 80, description: 'whom the link is for' }),
    roles: RolesSchema,
  },
  { $id: 'InvitationCreate', additionalProperties: false },
);
export type InvitationCreate = Static<typeof InvitationCreateSchema>;

/** The only answer that ever holds the token: the link is shown once. */
export const InvitationCreatedSchema = Type.Object(
  { invitation: InvitationSchema, token: Type.String() },
  { $id: 'InvitationCreated', additionalProperties: false },
);
export type InvitationCreated = Static<typeof InvitationCreatedSchema>;

export const HistoryQuerySchema = Type.Object(
  {
    ...pageQueryMembers,
    subjectId: Type.Optional(Uuid),
    from: Type.Optional(CalendarDate),
    to: Type.Optional(CalendarDate),
  },
  { $id: 'HistoryQuery', additionalProperties: false },
);
export type HistoryQuery = Static<typeof HistoryQuerySchema>;

export const HistoryEventSchema = Type.Object(
  {
    id: Uuid,
    at: Timestamp,
    actor: nullable(PersonRefSchema),
    action: Type.String({ description: 'such as spec.locked' }),
    subjectType: Type.String(),
    subjectId: nullable(Uuid),
    summary: Type.String({ description: 'what happened, in words' }),
  },
  { $id: 'HistoryEvent', additionalProperties: false },
);
export type HistoryEvent = Static<typeof HistoryEventSchema>;

export const HistoryPageSchema = pageOf(HistoryEventSchema, { $id: 'HistoryPage' });
