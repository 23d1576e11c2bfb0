import type { EntityManager } from '@mikro-orm/postgresql';

import type { SignedInPerson } from '../../http/route.ts';
import { AuditEvent } from './team.entity.ts';

export interface EventToRecord {
  teamId: string;
  person: Pick<SignedInPerson, 'id' | 'name'>;
  /** Area and past tense, such as `spec.locked`. */
  action: string;
  subjectType: string;
  subjectId: string | null;
  /** What happened, in words that still make sense when the subject is gone. */
  summary: string;
  /** When it happened; without it, the database's own clock says. */
  at?: Date;
}

/** Adds to the team's history; written with the caller's flush, so that it stands or falls with the change itself. */
export function recordEvent(em: EntityManager, event: EventToRecord): void {
  em.persist(
    em.create(AuditEvent, {
      team: event.teamId,
      actorId: event.person.id,
      actorName: event.person.name,
      action: event.action,
      subjectType: event.subjectType,
      subjectId: event.subjectId,
      summary: event.summary,
      ...(event.at && { at: event.at }),
    }),
  );
}
