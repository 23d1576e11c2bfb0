import type { EntityManager } from '@mikro-orm/postgresql';

import { problems } from '../../http/problems.ts';
import { type TeamOfPerson, findTeamsOf } from '../teams/index.ts';
import { User } from './account.entity.ts';

/** Addresses are kept and compared in lower case: nobody remembers which letters they wrote large. */
export function comparableEmail(email: string): string {
  return email.toLowerCase();
}

export function findUserByEmail(em: EntityManager, email: string): Promise<User | null> {
  return em.findOne(User, { email: comparableEmail(email) });
}

export interface PersonWithTeams {
  user: User;
  teams: TeamOfPerson[];
}

/** The person of a session, with their teams. */
export async function loadPerson(em: EntityManager, userId: string): Promise<PersonWithTeams> {
  const user = await em.findOne(User, { id: userId });
  if (user === null) throw problems.unauthenticated();
  return { user, teams: await findTeamsOf(em, userId) };
}
