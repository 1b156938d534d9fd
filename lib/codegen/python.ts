/** Python with NumPy: literals, and sweeps as ufunc calls on prebuilt views with `out=`. */
import type { Rational } from '@/lib/numerics/rational';
import { literalSource } from './coefficient';
import { readsOf, type Assignment, type Dialect, type Node, type Place } from './expression-tree';

/** Name of the view of an array that is shifted: u_m1 is u[i - 1], u_0_p1 on a grid the next row. */
export function viewName(array: string, offset: number, across: readonly number[] = []): string {
  const offsets = [offset, ...across];
  if (offsets.every((o) => o === 0)) return array;
  return [array, ...offsets.map((o) => (o === 0 ? '0' : `${o < 0 ? 'm' : 'p'}${Math.abs(o)}`))].join('_');
}

export const PYTHON: Dialect = { literal: (value: Rational) => literalSource(value), element: viewName };
export const PYTHON_SUFFIX = 'py';

export interface PythonSweep {
  readonly lines: readonly string[];
  /** Views that the lines use, targets first. */
  readonly views: readonly ({ readonly name: string; readonly array: string } & Place)[];
  /** Names of the scratch arrays. */
  readonly scratch: readonly string[];
}

const UFUNC = { sum: 'np.add', difference: 'np.subtract', product: 'np.multiply' } as const;
const SCRATCH = ['s', 't', 's3', 's4', 's5', 's6', 's7', 's8'];

class SweepWriter {
  readonly lines: string[] = [];
  readonly scratch: string[] = [];
  private readonly free = [...SCRATCH].reverse();
  private readonly values = new Map<string, string>();

  /** @param scalar how a coefficient or parameter is written */
  constructor(private readonly scalar: (name: string) => string) {}

  private take(): string {
    const name = this.free.pop();
    if (!name) throw new RangeError('pythonSweep: the expression needs too many scratch arrays');
    if (!this.scratch.includes(name)) this.scratch.push(name);
    return name;
  }

  private release(name: string) {
    if (SCRATCH.includes(name) && ![...this.values.values()].includes(name) && !this.free.includes(name))
      this.free.push(name);
  }

  private leaf(node: Node): string | null {
    if (node.kind === 'read') return viewName(node.array, node.offset, node.across);
    if (node.kind === 'number') return literalSource(node.value);
    if (node.kind === 'name') return this.values.get(node.name) ?? this.scalar(node.name);
    return null;
  }

  /** Writes the calls for a node. @param out where the result must go; null: a scratch array */
  private evaluate(node: Node, out: string | null, safe: boolean): string {
    const plain = this.leaf(node);
    if (plain !== null) {
      if (out !== null) this.lines.push(`np.copyto(${out}, ${plain})`);
      return plain;
    }
    const inner = safe ? out : null;
    if (node.kind === 'negation') {
      const operand = this.leaf(node.operand) ?? this.evaluate(node.operand, inner, safe);
      const target = out ?? (SCRATCH.includes(operand) ? operand : this.take());
      this.lines.push(`np.negative(${operand}, out=${target})`);
      if (operand !== target) this.release(operand);
      return target;
    }
    if (node.kind !== 'sum' && node.kind !== 'difference' && node.kind !== 'product')
      throw new RangeError(`pythonSweep: '${node.kind}' is no operation`);
    const leftLeaf = this.leaf(node.left);
    const left = leftLeaf ?? this.evaluate(node.left, inner, safe);
    const right =
      this.leaf(node.right) ?? this.evaluate(node.right, leftLeaf === null ? null : inner, safe && leftLeaf !== null);
    const own = (name: string) => SCRATCH.includes(name) && ![...this.values.values()].includes(name);
    const target = out ?? (own(left) ? left : own(right) ? right : this.take());
    this.lines.push(`${UFUNC[node.kind]}(${left}, ${right}, out=${target})`);
    for (const name of [left, right]) if (name !== target) this.release(name);
    return target;
  }

  assign(assignment: Assignment) {
    if (assignment.kind === 'value') {
      const target = this.take();
      this.evaluate(assignment.node, target, true);
      this.values.set(assignment.name, target);
      return;
    }
    const readsTarget = readsOf(assignment.node).some((r) => r.array === assignment.array);
    this.evaluate(assignment.node, assignment.array, !readsTarget);
  }
}

/** @param scalar how a coefficient or parameter is written, such as `self.a1` */
export function pythonSweep(assignments: readonly Assignment[], scalar: (name: string) => string): PythonSweep {
  const writer = new SweepWriter(scalar);
  const views = new Map<string, PythonSweep['views'][number]>();
  const see = (array: string, offset: number, across?: readonly number[]) => {
    const name = viewName(array, offset, across);
    views.set(name, { name, array, offset, across });
  };
  for (const assignment of assignments) if (assignment.kind === 'store') see(assignment.array, 0);
  for (const assignment of assignments) {
    for (const { array, offset, across } of readsOf(assignment.node)) see(array, offset, across);
    writer.assign(assignment);
  }
  return { lines: writer.lines, views: [...views.values()], scratch: writer.scratch };
}
