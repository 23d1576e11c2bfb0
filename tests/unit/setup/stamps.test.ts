import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

import { describe, expect, it } from 'vitest';

import { hashOf, isStamped, removeStamp, writeStamp } from '#server/setup/stamps.mjs';

import { temporaryFolder } from './temporary-folder.ts';

function aProject(): string {
  const root = temporaryFolder();
  mkdirSync(join(root, 'src', 'pages'), { recursive: true });
  writeFileSync(join(root, 'src', 'main.ts'), 'one');
  writeFileSync(join(root, 'src', 'pages', 'page.vue'), 'two');
  return root;
}

describe('the hash of sources', () => {
  it('is the same for the same content elsewhere', () => {
    expect(hashOf(aProject(), ['src'])).toBe(hashOf(aProject(), ['src']));
  });

  it('changes with a file in a folder below', () => {
    const root = aProject();
    const before = hashOf(root, ['src']);
    writeFileSync(join(root, 'src', 'pages', 'page.vue'), 'three');
    expect(hashOf(root, ['src'])).not.toBe(before);
  });

  it('changes when text moves from the end of one file to the start of the next', () => {
    const [first, second] = [temporaryFolder(), temporaryFolder()];
    for (const [root, texts] of [
      [first, ['ab', 'c']],
      [second, ['a', 'bc']],
    ] as const) {
      writeFileSync(join(root, '1'), texts[0]);
      writeFileSync(join(root, '2'), texts[1]);
    }
    expect(hashOf(first, ['1', '2'])).not.toBe(hashOf(second, ['1', '2']));
  });

  it('changes with a new file, and with the version of Node.js', () => {
    const root = aProject();
    const before = hashOf(root, ['src'], ['115']);
    expect(hashOf(root, ['src'], ['127'])).not.toBe(before);
    writeFileSync(join(root, 'src', 'new.ts'), '');
    expect(hashOf(root, ['src'], ['115'])).not.toBe(before);
  });

  it('takes a path that is not there', () => {
    expect(hashOf(aProject(), ['src', 'public'])).toBe(hashOf(aProject(), ['src']));
  });
});

describe('a stamp', () => {
  it('holds for the hash it was written with, until it is removed', () => {
    const file = join(temporaryFolder(), 'stamp');
    expect(isStamped(file, 'abc')).toBe(false);
    writeStamp(file, 'abc');
    expect(isStamped(file, 'abc')).toBe(true);
    expect(isStamped(file, 'abd')).toBe(false);
    removeStamp(file);
    expect(isStamped(file, 'abc')).toBe(false);
  });
});
