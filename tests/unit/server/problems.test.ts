import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';

import { describe, expect, it } from 'vitest';

import { PROBLEM_NAMES } from '#shared/contracts/problem.ts';

import { ProblemError } from '#server/http/problems.ts';
import { PROJECT_ROOT } from '#server/setup/paths.mjs';

const FOLDER = join(PROJECT_ROOT, 'docs/problems');

describe('the pages of the problems', () => {
  it('are one for each problem, and no more', () => {
    expect(readdirSync(FOLDER).sort()).toEqual(PROBLEM_NAMES.map((name) => `${name}.md`).sort());
  });

  it.each(PROBLEM_NAMES)('say of %s what the server says', (name) => {
    const { type, title, status } = new ProblemError(name, '').toProblem('');
    const page = readFileSync(join(FOLDER, `${name}.md`), 'utf8');
    expect(page.split('\n').slice(0, 3)).toEqual([`# ${title}`, '', `\`${type}\`, status ${status}`]);
    expect(page).toContain('**What to do.**');
  });
});
