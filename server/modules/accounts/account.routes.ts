import {
  AccountSchema,
  ChangePasswordSchema,
  SignInSchema,
  SignUpResultSchema,
  SignUpSchema,
} from '#shared/contracts/account.ts';

import { type AnyRoute, PUBLIC, SIGNED_IN, route } from '../../http/route.ts';
import { PASSWORD_LIMITS, SIGN_IN_LIMITS, SIGN_UP_LIMITS } from './account.limits.ts';
import { toAccount } from './account.mapper.ts';
import { loadPerson } from './account.queries.ts';
import { changePassword, checkCredentials, signUp } from './account.service.ts';
import { endSession, startSession } from './session.service.ts';

const tag = 'Accounts';

export const accountRoutes: AnyRoute[] = [
  route({
    operationId: 'signUp',
    method: 'post',
    path: '/auth/sign-up',
    summary: 'Make an account; the answer does not say whether the address had one',
    tag,
    access: PUBLIC,
    limits: SIGN_UP_LIMITS,
    body: SignUpSchema,
    response: { status: 202, schema: SignUpResultSchema },
    handler: async (context, { body }) => {
      await signUp(context, body);
      return { body: { next: 'sign-in' } };
    },
  }),
  route({
    operationId: 'signIn',
    method: 'post',
    path: '/auth/sign-in',
    summary: 'Start a session',
    tag,
    access: PUBLIC,
    limits: SIGN_IN_LIMITS,
    body: SignInSchema,
    response: { status: 200, schema: AccountSchema },
    handler: async (context, { body }) => {
      const person = await checkCredentials(context, body);
      const cookie = await startSession(context, person.user.id);
      return { body: toAccount(person), headers: { 'Set-Cookie': cookie } };
    },
  }),
  route({
    operationId: 'signOut',
    method: 'post',
    path: '/auth/sign-out',
    summary: 'End this session; also right when there is none',
    tag,
    access: PUBLIC,
    response: { status: 204, schema: null },
    handler: async (context) => ({ headers: { 'Set-Cookie': await endSession(context) } }),
  }),
  route({
    operationId: 'changePassword',
    method: 'post',
    path: '/auth/password',
    summary: 'Change the password and end the other sessions',
    tag,
    access: SIGNED_IN,
    limits: PASSWORD_LIMITS,
    body: ChangePasswordSchema,
    response: { status: 204, schema: null },
    handler: async (context, { body }) => {
      await changePassword(context, body);
      return {};
    },
  }),
  route({
    operationId: 'getAccount',
    method: 'get',
    path: '/auth/me',
    summary: 'The signed-in person and their teams',
    tag,
    access: SIGNED_IN,
    response: { status: 200, schema: AccountSchema },
    handler: async ({ em, person }) => ({ body: toAccount(await loadPerson(em, person.id)) }),
  }),
];
