import { createHash } from 'node:crypto';

import type { EntityManager } from '@mikro-orm/postgresql';

import { problems } from '../../http/problems.ts';
import { Invitation } from './team.entity.ts';

/** More open links than a team hands out; managers may withdraw old ones. */
export const MAX_OPEN_INVITATIONS = 200;

export interface OfferedToken {
  token: string;
  now: Date;
}

/** What is stored of a token: its hash, so that a read of the table lets nobody in. */
export function storedToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}

/** The invitation of a token. One that was used, has passed or never was is the same: not found. */
export async function findOpenInvitation(
  em: EntityManager,
  { token, now }: OfferedToken,
): Promise<Invitation> {
  const invitation = await em.findOne(
    Invitation,
    { tokenHash: storedToken(token), usedAt: null, expiresAt: { $gt: now } },
    { populate: ['team', 'createdBy'] },
  );
  if (invitation === null) throw noSuchInvitation();
  return invitation;
}

/** Marks the invitation as used, if it is still open: of two who come at the same moment, one succeeds. */
export async function consumeInvitation(em: EntityManager, { token, now }: OfferedToken): Promise<void> {
  const used = await em.nativeUpdate(
    Invitation,
    { tokenHash: storedToken(token), usedAt: null, expiresAt: { $gt: now } },
    { usedAt: now },
  );
  if (used !== 1) throw noSuchInvitation();
}

/** Open invitations, the newest first. */
export function findOpenInvitations(
  em: EntityManager,
  { teamId, now }: { teamId: string; now: Date },
): Promise<Invitation[]> {
  return em.find(
    Invitation,
    { team: teamId, usedAt: null, expiresAt: { $gt: now } },
    {
      populate: ['createdBy'],
      orderBy: [{ createdAt: 'desc' }, { id: 'desc' }],
      limit: MAX_OPEN_INVITATIONS,
    },
  );
}

function noSuchInvitation() {
  // The token itself is a secret and is not repeated.
  return problems.notFound('invitation', 'token');
}
