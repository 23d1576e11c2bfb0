import { randomUUID } from 'node:crypto';

import type { EntityManager } from '@mikro-orm/postgresql';

import type { Glass as GlassResource, GlassWrite } from '#shared/contracts/glass.ts';
import { COMMON_GLASSES } from '#shared/physics/data/glasses.ts';
import { DomainError } from '#shared/physics/domain-error.ts';
import { brimMlOfProfile } from '#shared/physics/glass.ts';
import { formatVolume } from '#shared/text/format-quantity.ts';

import { problems } from '../../http/problems.ts';
import { flushBased, refuseStale } from '../../http/revision.ts';
import type { ActingContext } from '../../http/route.ts';
import { recordEvent } from '../teams/index.ts';
import { Glass } from './glass.entity.ts';
import { toGlass } from './glass.mapper.ts';
import { loadGlass } from './glass.queries.ts';

/** What a bar may call a glass, from a thimble to a punch bowl [mL]. */
const BRIM_RANGE_ML = { min: 5, max: 20_000 } as const;

export async function addGlass(
  { em, teamId, person }: ActingContext,
  write: GlassWrite,
): Promise<GlassResource> {
  const glass = em.create(Glass, { id: randomUUID(), team: teamId, ...columnsOf(write) });
  recordGlassEvent(em, { teamId, person, glass, action: 'glass.added', words: 'Added the glass' });
  await em.flush();
  return toGlass(glass);
}

export async function changeGlass(
  { em, teamId, person }: ActingContext,
  { glassId, write, ifMatch }: { glassId: string; write: GlassWrite; ifMatch: number },
): Promise<GlassResource> {
  const glass = await loadGlass(em, { teamId, glassId });
  refuseStale(glass, { ifMatch, current: () => toGlass(glass) });
  em.assign(glass, columnsOf(write));
  recordGlassEvent(em, { teamId, person, glass, action: 'glass.changed', words: 'Changed the glass' });
  await flushBased(em, async (fresh) => toGlass(await loadGlass(fresh, { teamId, glassId })));
  return toGlass(glass);
}

export async function setGlassRetired(
  { em, teamId, person, now }: ActingContext,
  { glassId, retired, ifMatch }: { glassId: string; retired: boolean; ifMatch: number },
): Promise<GlassResource> {
  const glass = await loadGlass(em, { teamId, glassId });
  refuseStale(glass, { ifMatch, current: () => toGlass(glass) });
  glass.retiredAt = retired ? now() : null;
  const words = retired ? 'Retired the glass' : 'Brought back the glass';
  recordGlassEvent(em, {
    teamId,
    person,
    glass,
    action: retired ? 'glass.retired' : 'glass.restored',
    words,
  });
  await flushBased(em, async (fresh) => toGlass(await loadGlass(fresh, { teamId, glassId })));
  return toGlass(glass);
}

/** Gives a new team the common glasses; the caller flushes. */
export function stockGlasses(em: EntityManager, teamId: string): void {
  for (const { name, profile, stemMm } of COMMON_GLASSES) {
    em.create(Glass, { team: teamId, ...columnsOf({ name, stemMm, profile: [...profile] }) });
  }
}

function columnsOf({ name, profile, stemMm }: GlassWrite) {
  return {
    name: name.trim(),
    profile: profile.map((point) => ({ ...point })),
    stemMm,
    brimMl: brimOf(profile),
  };
}

/** The volume to the brim; a profile that encloses none is refused where it goes wrong. */
function brimOf(profile: GlassWrite['profile']): number {
  profile.forEach((point, index) => {
    const below = profile[index - 1];
    if (index === 0 && point.heightMm !== 0) {
      const detail = `heightMm no. 1 is ${point.heightMm}; a profile begins at 0, the inside bottom.`;
      throw problems.invalidField('#/profile/0/heightMm', 'minimum', detail);
    }
    if (below !== undefined && point.heightMm <= below.heightMm) {
      const detail = `heightMm no. ${index + 1} is ${point.heightMm}; it must be more than the ${below.heightMm} before it.`;
      throw problems.invalidField(`#/profile/${index}/heightMm`, 'rising', detail);
    }
  });
  try {
    const brimMl = brimMlOfProfile(profile);
    if (brimMl >= BRIM_RANGE_ML.min && brimMl <= BRIM_RANGE_ML.max) return brimMl;
    const detail = `profile holds ${brimMl.toFixed(1)} ml; a glass holds ${BRIM_RANGE_ML.min} to ${BRIM_RANGE_ML.max} ml.`;
    throw problems.invalidField('#/profile', 'range', detail);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw problems.invalidField('#/profile', 'domain', `profile: ${error.message}.`);
  }
}

function recordGlassEvent(
  em: EntityManager,
  event: Pick<ActingContext, 'teamId' | 'person'> & { glass: Glass; action: string; words: string },
): void {
  const { teamId, person, glass, action, words } = event;
  const summary = `${words} ${glass.name}, ${formatVolume({ volumeMl: glass.brimMl, unit: 'ml' })} to the brim`;
  recordEvent(em, { teamId, person, action, subjectType: 'glass', subjectId: glass.id, summary });
}
