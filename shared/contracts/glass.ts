import { type Static, Type } from '@sinclair/typebox';

import { Revision, Timestamp, Uuid, lineOfText, nullable } from './common.ts';
import { GLASS_RANGES } from '../physics/glass.ts';

const ProfilePointSchema = Type.Object(
  {
    heightMm: Type.Number({
      minimum: GLASS_RANGES.heightMm.min,
      maximum: GLASS_RANGES.heightMm.max,
      description: 'height above the inside bottom [mm]',
    }),
    radiusMm: Type.Number({
      minimum: GLASS_RANGES.radiusMm.min,
      maximum: GLASS_RANGES.radiusMm.max,
      description: 'inside radius at that height [mm]',
    }),
  },
  { additionalProperties: false },
);

const glassMembers = {
  name: lineOfText({ maxLength: 80, description: 'name of the glass' }),
  profile: Type.Array(ProfilePointSchema, {
    minItems: GLASS_RANGES.points.min,
    maxItems: GLASS_RANGES.points.max,
    description: 'inside profile from the bottom to the brim, heights rising',
  }),
  stemMm: Type.Number({
    minimum: 0,
    maximum: 250,
    description: 'foot and stem below the bowl, drawn only [mm]',
  }),
};

export const GlassSchema = Type.Object(
  {
    id: Uuid,
    revision: Revision,
    ...glassMembers,
    brimMl: Type.Number({ description: 'volume to the brim, from the profile [mL]' }),
    retiredAt: nullable(Timestamp),
  },
  { $id: 'Glass', additionalProperties: false },
);
export type Glass = Static<typeof GlassSchema>;

export const GlassWriteSchema = Type.Object(glassMembers, { $id: 'GlassWrite', additionalProperties: false });
export type GlassWrite = Static<typeof GlassWriteSchema>;

export const GlassListSchema = Type.Object(
  { items: Type.Array(GlassSchema) },
  { $id: 'GlassList', additionalProperties: false },
);
export type GlassList = Static<typeof GlassListSchema>;

/** A glass as a version remembers it. */
export const GlassSnapshotSchema = Type.Object(
  { id: Uuid, ...glassMembers, brimMl: Type.Number() },
  { additionalProperties: false },
);
export type GlassSnapshot = Static<typeof GlassSnapshotSchema>;
