/**
 * The arithmetic of one sweep over the points, as a tree. All languages print the same tree, so that they
 * associate and round alike.
 */
import type { Rational } from '@/lib/numerics/rational';

/** A point relative to the one that is computed. */
export interface Place {
  /** Along the row: x. */
  readonly offset: number;
  /** Along y, and z: in two and three dimensions only. */
  readonly across?: readonly number[] | undefined;
}

export type Node =
  /** array at i + offset, j + across[0], k + across[1] */
  | ({ readonly kind: 'read'; readonly array: string } & Place)
  /** A coefficient, a parameter, or a value kept at the point. */
  | { readonly kind: 'name'; readonly name: string }
  | { readonly kind: 'number'; readonly value: Rational }
  | { readonly kind: 'negation'; readonly operand: Node }
  | { readonly kind: 'sum' | 'difference' | 'product'; readonly left: Node; readonly right: Node };

export const read = (array: string, offset: number, across?: readonly number[]): Node =>
  across ? { kind: 'read', array, offset, across } : { kind: 'read', array, offset };

/** Offsets along x, y, z, as many as there are dimensions. */
export const componentsOf = ({ offset, across = [] }: Place): number[] => [offset, ...across];
export const named = (name: string): Node => ({ kind: 'name', name });
export const number = (value: Rational): Node => ({ kind: 'number', value });
export const negation = (operand: Node): Node => ({ kind: 'negation', operand });
export const sum = (left: Node, right: Node): Node => ({ kind: 'sum', left, right });
export const difference = (left: Node, right: Node): Node => ({ kind: 'difference', left, right });
export const product = (left: Node, right: Node): Node => ({ kind: 'product', left, right });

export interface SignedNode {
  readonly negative: boolean;
  readonly node: Node;
}

/** ((±a ± b) ± c) …, from left to right. @throws {RangeError} if the list is empty */
export function signedSum(terms: readonly SignedNode[]): Node {
  const [first, ...rest] = terms;
  if (!first) throw new RangeError('signedSum: there are no terms');
  return rest.reduce(
    (sumSoFar, { negative, node }) => (negative ? difference(sumSoFar, node) : sum(sumSoFar, node)),
    first.negative ? negation(first.node) : first.node,
  );
}

/** Every read below a node, left to right. */
export function readsOf(node: Node): ({ readonly array: string } & Place)[] {
  switch (node.kind) {
    case 'read':
      return [node];
    case 'negation':
      return readsOf(node.operand);
    case 'sum':
    case 'difference':
    case 'product':
      return [...readsOf(node.left), ...readsOf(node.right)];
    default:
      return [];
  }
}

/** One assignment of a sweep. `value`: kept at the point under this name; `store`: written to the array at i. */
export type Assignment =
  | { readonly kind: 'value'; readonly name: string; readonly node: Node }
  | { readonly kind: 'store'; readonly array: string; readonly node: Node };

export interface Dialect {
  literal(value: Rational): string;
  element(array: string, offset: number, across?: readonly number[]): string;
}

const PRECEDENCE = { read: 3, name: 3, number: 3, product: 2, negation: 1, sum: 1, difference: 1 } as const;

/** A node in infix notation; brackets stand only where the tree needs them. */
export function infix(node: Node, dialect: Dialect): string {
  const inside = (child: Node, least: number) => {
    const text = infix(child, dialect);
    return PRECEDENCE[child.kind] < least ? `(${text})` : text;
  };
  switch (node.kind) {
    case 'read':
      return dialect.element(node.array, node.offset, node.across);
    case 'name':
      return node.name;
    case 'number':
      return dialect.literal(node.value);
    case 'negation':
      return `-${inside(node.operand, 2)}`;
    case 'sum':
      return `${inside(node.left, 1)} + ${inside(node.right, 2)}`;
    case 'difference':
      return `${inside(node.left, 1)} - ${inside(node.right, 2)}`;
    case 'product':
      return `${inside(node.left, 2)}*${inside(node.right, 3)}`;
  }
}
