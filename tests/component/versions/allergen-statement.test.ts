import { enableAutoUnmount, mount } from '@vue/test-utils';
import { afterEach, describe, expect, it } from 'vitest';

import type { Figures } from '#shared/contracts/version.ts';
import AllergenStatement from '#src/components/versions/AllergenStatement.vue';
import { textOf } from '#tests/support/by-role.ts';

enableAutoUnmount(afterEach);

function statement(allergens: Partial<Figures['allergens']>): string {
  const whole = { contains: [], mayContain: [], notReviewed: [], ...allergens };
  mount(AllergenStatement, { props: { allergens: whole }, attachTo: document.body });
  return textOf(document.body);
}

describe('the allergen statement', () => {
  it('says none only when every ingredient was reviewed', () => {
    expect(statement({})).toContain('Contains none of the 14 groups');
  });

  it('never says none while an ingredient is not reviewed', () => {
    const words = statement({ notReviewed: ['House vermouth'] });
    expect(words).not.toMatch(/none/i);
    expect(words).toContain('Contains not known yet');
    expect(words).toContain('House vermouth: ask before it is served');
  });

  it('still names what is known when something else is not', () => {
    const words = statement({ contains: ['eggs'], notReviewed: ['House vermouth'] });
    expect(words).toContain('Contains eggs');
    expect(words).toContain('Not reviewed House vermouth');
  });

  it('gives the United States list its own line, without the European groups it lacks', () => {
    const words = statement({ contains: ['sulphites', 'milk'] });
    expect(words).toContain('Contains milk, sulphites');
    expect(words).toMatch(/US major allergens milk$/);
  });

  it('says that the United States list means wheat where the European means cereals with gluten', () => {
    expect(statement({ contains: ['gluten'] })).toContain(
      'US major allergens wheat (where the cereal is wheat)',
    );
  });
});
