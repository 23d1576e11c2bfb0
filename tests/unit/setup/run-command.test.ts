import { describe, expect, it } from 'vitest';

import { run } from '#server/setup/run-command.mjs';

const node = (script: string, options = {}) => run(process.execPath, ['-e', script], options);

describe('a command that is run', () => {
  it('hands over its exit code and all it printed', async () => {
    const result = await node('console.log("out"); console.error("err"); process.exit(3)');
    expect(result.code).toBe(3);
    expect(result.output).toContain('out\n');
    expect(result.output).toContain('err\n');
  });

  it('gets its input', async () => {
    const { output } = await node('process.stdin.pipe(process.stdout)', { input: 'lime' });
    expect(output).toBe('lime');
  });

  it('has failed when it ends well but printed what means failure', async () => {
    const script = 'console.error("warn TAR_ENTRY_ERROR ENOSPC"); console.log("x".repeat(200_000))';
    expect((await node(script)).code).toBe(0);
    const { code, output } = await node(script, { failsOn: /TAR_ENTRY_ERROR/ });
    expect(code).toBe(1);
    expect(output).toContain('ENOSPC');
  });

  it('has failed when it was ended, or cannot be found', async () => {
    expect(await node('process.kill(process.pid, "SIGKILL")')).toMatchObject({ code: 1 });
    expect(await run('/nowhere/program', [])).toMatchObject({ code: 127 });
  });
});
