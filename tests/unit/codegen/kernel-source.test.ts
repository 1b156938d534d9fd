import { describe, expect, it } from 'vitest';
import { fillTemplate } from '@/lib/codegen/kernel-source';

const fill = (template: string, view: Parameters<typeof fillTemplate>[2]) => fillTemplate('x.c', template, view);

describe('a template', () => {
  it('gives each line of a value the indentation of its hole', () => {
    expect(fill('{\n    {{body}}\n}', { body: 'a = 1;\n\nb = 2;' })).toBe('{\n    a = 1;\n\n    b = 2;\n}');
  });

  it('drops the line of a hole that stands alone where its value is empty', () => {
    expect(fill('a\n  {{nothing}}\nb', { nothing: '' })).toBe('a\nb');
  });

  it('repeats what stands between {{#each}} and {{/each}}, and still knows the outer values', () => {
    const view = { prefix: 'lb', rows: [{ name: 'x' }, { name: 'y' }] };
    expect(fill('{{#each rows}}\n{{prefix}}_{{name}};\n{{/each}}\nend', view)).toBe('lb_x;\nlb_y;\nend');
  });

  it('leaves out a part whose list is empty without asking for its values', () => {
    expect(fill('a\n{{#each none}}\n{{inner}}\n{{/each}}\nb', { none: [] })).toBe('a\nb');
  });

  it.each([
    // what                         template                             view             message
    ['a hole without a value', 'a\nb {{x}} c', {}, /x\.c, line 2: the hole 'x' has no value/],
    ['a value without a hole', 'a\nb', { x: '1' }, /x\.c, line 2: the value 'x' has no hole/],
    ['arithmetic', '{{x/12}}', { x: '1' }, /x\.c, line 1: .*is no hole/],
    ['a list printed as text', '\n{{x}}', { x: [] }, /line 2: 'x' is a list/],
    ['a text used as a list', '{{#each x}}\n{{/each}}', { x: '1' }, /line 1: 'x' is text/],
    ['an each that never ends', 'a\n{{#each x}}\nb', { x: [] }, /line 2: this \{\{#each\}\} has no/],
    ['an end that never began', 'a\n{{/each}}', {}, /line 2: this \{\{\/each\}\} has no/],
  ] as const)('refuses %s, naming file and line', (_, template, view, message) => {
    expect(() => fill(template, view)).toThrow(message);
  });
});
