/**
 * View + template text → source text. Templates know two things: `{{name}}`, and `{{#each list}}` … `{{/each}}` on
 * lines of their own. A hole that stands alone on its line takes as many lines as its value has, each indented like
 * the hole; with an empty value the line goes.
 */
export interface View {
  readonly [name: string]: string | readonly View[];
}

const EACH = /^\s*\{\{#each (\w+)\}\}\s*$/;
const END = /^\s*\{\{\/each\}\}\s*$/;
const ALONE = /^(\s*)\{\{(\w+)\}\}$/;
const HOLE = /\{\{([^{}]*)\}\}/g;

class Filler {
  private readonly used = new Set<string>();

  constructor(
    private readonly file: string,
    private readonly lines: readonly string[],
  ) {}

  private fail(line: number, message: string): never {
    throw new RangeError(`${this.file}, line ${line + 1}: ${message}`);
  }

  private lookUp(name: string, scopes: readonly View[], line: number): string | readonly View[] {
    const own = scopes.findIndex((scope) => Object.hasOwn(scope, name));
    if (own < 0) this.fail(line, `the hole '${name}' has no value`);
    this.used.add(name);
    return scopes[own]![name]!;
  }

  private text(name: string, scopes: readonly View[], line: number): string {
    if (!/^\w+$/.test(name))
      this.fail(line, `'{{${name}}}' is no hole; accepted: {{name}} and {{#each name}} … {{/each}}`);
    const value = this.lookUp(name, scopes, line);
    if (typeof value !== 'string') this.fail(line, `'${name}' is a list; print it with {{#each ${name}}}`);
    return value;
  }

  private endOf(start: number, stop: number): number {
    let depth = 0;
    for (let k = start; k < stop; k++) {
      if (EACH.test(this.lines[k]!)) depth++;
      else if (END.test(this.lines[k]!) && --depth === 0) return k;
    }
    return this.fail(start, 'this {{#each}} has no {{/each}}');
  }

  private range(start: number, stop: number, scopes: readonly View[]): string[] {
    const out: string[] = [];
    for (let k = start; k < stop; k++) {
      const line = this.lines[k]!;
      if (END.test(line)) this.fail(k, 'this {{/each}} has no {{#each}}');
      const each = EACH.exec(line);
      if (each) {
        const end = this.endOf(k, stop);
        const items = this.lookUp(each[1]!, scopes, k);
        if (typeof items === 'string') this.fail(k, `'${each[1]}' is text, not a list`);
        for (const item of items) out.push(...this.range(k + 1, end, [item, ...scopes]));
        if (items.length === 0) this.visit(k + 1, end);
        k = end;
        continue;
      }
      const alone = ALONE.exec(line);
      if (alone) {
        const value = this.text(alone[2]!, scopes, k);
        if (value !== '') out.push(...value.split('\n').map((l) => (l === '' ? '' : alone[1]! + l)));
        continue;
      }
      out.push(line.replace(HOLE, (_, name: string) => this.text(name, scopes, k)).trimEnd());
    }
    return out;
  }

  /** Marks the holes of a part that is left out, so that their values do not count as unused. */
  private visit(start: number, stop: number) {
    for (let k = start; k < stop; k++) {
      const line = this.lines[k]!;
      const each = EACH.exec(line);
      if (each) this.used.add(each[1]!);
      for (const [, name] of line.matchAll(HOLE)) this.used.add(name!);
    }
  }

  fill(view: View): string {
    const text = this.range(0, this.lines.length, [view]).join('\n');
    for (const name of Object.keys(view))
      if (!this.used.has(name)) {
        const at = this.lines.length;
        throw new RangeError(`${this.file}, line ${at}: the value '${name}' has no hole`);
      }
    return text;
  }
}

/**
 * @param file name of the template, for messages
 * @throws {RangeError} naming file and line, where a hole has no value or a value no hole
 */
export function fillTemplate(file: string, template: string, view: View): string {
  return new Filler(file, template.split('\n')).fill(view);
}
