import { enableAutoUnmount, mount } from '@vue/test-utils';
import { afterEach, describe, expect, it } from 'vitest';
import { nextTick } from 'vue';

import FieldNumber from '#src/components/ui/FieldNumber.vue';
import { byRole, textOf, typeInto } from '#tests/support/by-role.ts';

enableAutoUnmount(afterEach);

function field(props: Record<string, unknown> = {}) {
  const wrapper = mount(FieldNumber, {
    props: { label: 'One dash', unit: 'ml', modelValue: 0.8, min: 0.2, max: 2, ...props },
    attachTo: document.body,
  });
  return {
    wrapper,
    input: byRole<HTMLInputElement>(document.body, 'textbox', 'One dash'),
    last: (event: string) => wrapper.emitted(event)?.at(-1),
  };
}

describe('a number field', () => {
  it('shows its number with unit and range', () => {
    const { input, wrapper } = field();
    expect(input.value).toBe('0.8');
    expect(textOf(wrapper.element as Node)).toContain('ml');
    expect(textOf(wrapper.element as Node)).toContain('0.2 to 2 ml');
  });

  it.each([
    ['1.5', 1.5],
    ['1,5', 1.5],
  ])('reads %s', async (typed, value) => {
    const { input, last } = field();
    typeInto(input, typed);
    await nextTick();
    expect(last('update:modelValue')).toEqual([value]);
  });

  it.each(['abc', '-1', '3', '1.2.3'])(
    'refuses %s at the field and says that something is written there',
    async (typed) => {
      const { input, last, wrapper } = field();
      typeInto(input, typed);
      await nextTick();
      expect(last('update:modelValue')).toEqual([null]);
      expect(last('update:unreadable')).toEqual([true]);
      expect(input.getAttribute('aria-invalid')).toBe('true');
      expect(byRole(wrapper.element as HTMLElement, 'alert').textContent).not.toBe('');
    },
  );

  it('takes an empty field for no number, which is no mistake of the field', async () => {
    const { input, last } = field();
    typeInto(input, '');
    await nextTick();
    expect(last('update:modelValue')).toEqual([null]);
    expect(input.getAttribute('aria-invalid')).not.toBe('true');
  });

  it('keeps what is being typed while the number stays the same, and follows a change from outside', async () => {
    const { input, wrapper } = field();
    typeInto(input, '0,80');
    await nextTick();
    await wrapper.setProps({ modelValue: 0.8 });
    expect(input.value).toBe('0,80');
    await wrapper.setProps({ modelValue: 1.2 });
    expect(input.value).toBe('1.2');
  });

  it("shows the server's words where it has any", () => {
    const { wrapper } = field({ error: 'dashMl must be at least 0.2.' });
    expect(textOf(wrapper.element as Node)).toContain('dashMl must be at least 0.2.');
  });
});
