import { type Ref, ref } from 'vue';

import type { SignUp } from '#shared/contracts/account.ts';
import { PASSWORD_LENGTH } from '#shared/contracts/account.ts';
import type { FieldError } from '#shared/contracts/problem.ts';
import { signUp } from '#src/api/account.ts';
import { ApiProblem } from '#src/api/http.ts';
import { type Submission, useSubmission } from '#src/composables/useSubmission.ts';
import { useSessionStore } from '#src/stores/session.ts';

export interface SignUpFlow {
  form: Submission;
  /** The sign-up was taken, but the password does not open the account: the address may have had one already. */
  needsOtherPassword: Ref<boolean>;
  /** True when the person is signed in at the end. */
  send: (person: SignUp) => Promise<boolean>;
}

/**
 * Signs up and then in with the same credentials. The server's answer to a sign-up is the same for an address that
 * already has an account; only somebody who knows that account's password gets in.
 */
export function useSignUp(): SignUpFlow {
  const session = useSessionStore();
  const form = useSubmission(['#/name', '#/email', '#/password', '#/teamName']);
  const needsOtherPassword = ref(false);

  async function signUpAndIn(person: SignUp) {
    await signUp(person);
    try {
      await session.enter({ email: person.email, password: person.password });
    } catch (error) {
      if (!(error instanceof ApiProblem && error.is('wrong-credentials'))) throw error;
      needsOtherPassword.value = true;
    }
  }

  async function send(person: SignUp): Promise<boolean> {
    const errors = signUpErrors(person);
    form.refuse(errors);
    needsOtherPassword.value = false;
    if (errors.length > 0) return false;
    return (await form.submit(() => signUpAndIn(person))) && !needsOtherPassword.value;
  }

  return { form, needsOtherPassword, send };
}

/** What can be told before asking the server, at the fields. */
export function signUpErrors(person: SignUp): FieldError[] {
  const errors: FieldError[] = [];
  const refuse = (pointer: string, code: string, detail: string) => errors.push({ pointer, code, detail });
  if (person.name === '') refuse('#/name', 'required', 'Write the name your team knows you by.');
  if (!person.email.includes('@'))
    refuse('#/email', 'format', 'Write an e-mail address, such as name@example.test.');
  if (person.password.length < PASSWORD_LENGTH.min) {
    refuse('#/password', 'minLength', `The password needs ${PASSWORD_LENGTH.min} characters or more.`);
  }
  if (person.teamName === '') refuse('#/teamName', 'required', 'Write the name of the bar or team.');
  return errors;
}
