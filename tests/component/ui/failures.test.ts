import { enableAutoUnmount, mount } from '@vue/test-utils';
import { afterEach, describe, expect, it } from 'vitest';

import { ApiProblem, NoAnswerError } from '#src/api/http.ts';
import type { Problem } from '#shared/contracts/problem.ts';
import FailedState from '#src/components/ui/FailedState.vue';
import { allByRole, byRole, textOf } from '#tests/support/by-role.ts';

enableAutoUnmount(afterEach);

function failed(failure: unknown) {
  const wrapper = mount(FailedState, { props: { failure }, attachTo: document.body });
  return { wrapper, words: () => textOf(byRole(document.body, 'alert')) };
}

const PROBLEM: Problem = {
  type: '/problems/internal',
  title: 'Something went wrong on the server',
  status: 500,
  detail: 'The fault was logged.',
  instance: 'request-7',
  name: 'internal',
};

describe('a load that failed', () => {
  it('says so, names the request for the log, and can be tried again', () => {
    const { wrapper, words } = failed(new ApiProblem(PROBLEM));
    expect(words()).toContain('Something went wrong on the server');
    expect(words()).toContain('request-7');
    byRole(document.body, 'button', 'Try again').click();
    expect(wrapper.emitted('retry')).toHaveLength(1);
  });

  it('offers no second try of what will be refused again, and names no log', () => {
    const { words } = failed(
      new ApiProblem({ ...PROBLEM, status: 403, name: 'forbidden', title: 'Not allowed' }),
    );
    expect(words()).toContain('Not allowed');
    expect(words()).not.toContain('request-7');
    expect(allByRole(document.body, 'button', 'Try again')).toHaveLength(0);
  });

  it('tells a missing network from a refusal', () => {
    const { words } = failed(new NoAnswerError(new TypeError('x')));
    expect(words()).toContain('No answer from the server');
    expect(allByRole(document.body, 'button', 'Try again')).toHaveLength(1);
  });

  it('shows nothing of an error that was not foreseen', () => {
    const { words } = failed(new Error('undefined is not a function'));
    expect(words()).toContain('This did not work');
    expect(words()).not.toContain('undefined');
  });
});
