import type {
  Account,
  ChangePassword,
  InvitationPreview,
  SignIn,
  SignUp,
  SignUpResult,
} from '#shared/contracts/account.ts';
import { request } from './http.ts';

/** The signed-in person with their teams; refused as `unauthenticated` when nobody is. */
export function getAccount(): Promise<Account> {
  return request({ method: 'GET', path: '/auth/me', maySignedOut: true });
}

export function signUp(body: SignUp): Promise<SignUpResult> {
  return request({ method: 'POST', path: '/auth/sign-up', body });
}

export function signIn(body: SignIn): Promise<Account> {
  return request({ method: 'POST', path: '/auth/sign-in', body });
}

export function signOut(): Promise<void> {
  return request({ method: 'POST', path: '/auth/sign-out', maySignedOut: true });
}

export function changePassword(body: ChangePassword): Promise<void> {
  return request({ method: 'POST', path: '/auth/password', body });
}

export function getInvitation(token: string): Promise<InvitationPreview> {
  return request({ method: 'GET', path: `/invitations/${encodeURIComponent(token)}`, maySignedOut: true });
}

export function acceptInvitation(token: string): Promise<Account> {
  return request({ method: 'POST', path: `/invitations/${encodeURIComponent(token)}/accept` });
}
