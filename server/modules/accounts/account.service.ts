import { randomUUID } from 'node:crypto';

import { type EntityManager, UniqueConstraintViolationException } from '@mikro-orm/postgresql';

import type { ChangePassword, SignIn, SignUp } from '#shared/contracts/account.ts';

import { problems } from '../../http/problems.ts';
import type { RequestContext, SignedInContext } from '../../http/route.ts';
import { createTeam, findOpenInvitation, joinByInvitation } from '../teams/index.ts';
import { Session, User } from './account.entity.ts';
import { comparableEmail, findUserByEmail, loadPerson, type PersonWithTeams } from './account.queries.ts';
import { storedSessionId } from './lucia.ts';
import { hashPassword, isRightPassword } from './password.ts';

/**
 * Makes an account, and with it a first team or a place in the team of an invitation. An address that has an account
 * already keeps it as it is, and the answer and the work of hashing are the same.
 */
export async function signUp({ em, now }: RequestContext, input: SignUp): Promise<void> {
  const { invitationToken, teamName } = input;
  if (invitationToken !== undefined) await findOpenInvitation(em, { token: invitationToken, now: now() });
  const passwordHash = await hashPassword(input.password);
  if ((await findUserByEmail(em, input.email)) !== null) return;
  try {
    await em.transactional(async (transaction) => {
      const user = addUser(transaction, { ...input, passwordHash });
      if (invitationToken !== undefined) {
        await joinByInvitation(transaction, { token: invitationToken, now: now(), person: user });
      } else if (teamName !== undefined) {
        createTeam(transaction, { name: teamName, creator: user });
      }
    });
  } catch (error) {
    // Two sign-ups of one address at the same moment: the second is like one of a known address.
    if (!(await isAddressTaken(em.fork(), error, input.email))) throw error;
  }
}

function addUser(
  em: EntityManager,
  { email, name, passwordHash }: Pick<SignUp, 'email' | 'name'> & { passwordHash: string },
): User {
  return em.create(User, {
    id: randomUUID(),
    email: comparableEmail(email),
    name: name.trim(),
    passwordHash,
  });
}

async function isAddressTaken(em: EntityManager, error: unknown, email: string): Promise<boolean> {
  if (!(error instanceof UniqueConstraintViolationException)) return false;
  return (await findUserByEmail(em, email)) !== null;
}

/** The person, or `wrong-credentials`, which does not say which of the two was wrong. */
export async function checkCredentials(
  { em }: RequestContext,
  { email, password }: SignIn,
): Promise<PersonWithTeams> {
  const user = await findUserByEmail(em, email);
  const isRight = await isRightPassword(password, user?.passwordHash ?? null);
  if (user === null || !isRight) throw problems.wrongCredentials();
  return loadPerson(em, user.id);
}

/** Changes the password and ends every other session of the person; this one stays. */
export async function changePassword(
  { em, person, sessionId }: SignedInContext,
  { currentPassword, newPassword }: ChangePassword,
): Promise<void> {
  const { user } = await loadPerson(em, person.id);
  if (!(await isRightPassword(currentPassword, user.passwordHash))) {
    throw problems.invalidField('#/currentPassword', 'wrong', 'The current password is not right.');
  }
  const passwordHash = await hashPassword(newPassword);
  await em.transactional(async (transaction) => {
    await transaction.nativeUpdate(User, { id: user.id }, { passwordHash });
    await transaction.nativeDelete(Session, {
      user: user.id,
      ...(sessionId !== null && { id: { $ne: storedSessionId(sessionId) } }),
    });
  });
}
