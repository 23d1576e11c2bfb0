import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

import { describe, expect, it } from 'vitest';

import { chooseClusterFolder } from '#server/setup/cluster-folder.mjs';

import { temporaryFolder } from './temporary-folder.ts';

describe('the folder of the cluster', () => {
  const choose = (dataFolder: string, systemFolder: string, reachable: boolean) =>
    chooseClusterFolder({ dataFolder, systemFolder, canEnter: () => reachable });

  it('is in the data folder when PostgreSQL can get there', () => {
    expect(choose('/srv/lab/.data', '/var/lib/lab', true)).toBe('/srv/lab/.data/postgres');
  });

  it('is in the system folder, one for each project, when it cannot', () => {
    const first = choose('/root/one/.data', '/var/lib/lab', false);
    expect(first).toMatch(/^\/var\/lib\/lab\/[0-9a-f]{16}\/postgres$/);
    expect(choose('/root/two/.data', '/var/lib/lab', false)).not.toBe(first);
  });

  it('stays where the data are', () => {
    const [data, system] = [temporaryFolder(), temporaryFolder()];
    const far = choose(data, system, false);
    mkdirSync(far, { recursive: true });
    writeFileSync(join(far, 'PG_VERSION'), '15\n');
    expect(choose(data, system, true)).toBe(far);
  });
});
