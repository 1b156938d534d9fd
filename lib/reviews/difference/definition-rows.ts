/** A definition as rows that can be held against another's: one coefficient, weight or number a row. */
import type { Definition, StencilDefinition, TimeMethod } from '@/lib/entries/definition';
import { signed } from '@/lib/facts/reading-texts';
import type { Row } from './row-difference';

type Offset = string | readonly string[];

const shifted = (letter: string, by: string) => {
  if (/^[+-]?0+(\.0*)?(\/\d+)?$/.test(by)) return letter;
  return by.startsWith('-') ? `${letter} − ${by.slice(1)}` : `${letter} + ${by.replace(/^\+/, '')}`;
};

/** "i − 1", "i, j + 1/2" */
const offsetText = (offset: Offset) =>
  (typeof offset === 'string' ? [offset] : offset).map((by, axis) => shifted('ijk'[axis] ?? 'i', by)).join(', ');
const siteText = (unknown: string, level: string, offset: Offset) =>
  `${unknown} at ${shifted('n', level)}; ${offsetText(offset)}`;

/** Rows of the same name are told apart by a count. */
function numbered(rows: readonly Row[]): Row[] {
  const seen = new Map<string, number>();
  return rows.map(({ place, value }) => {
    const count = (seen.get(place) ?? 0) + 1;
    seen.set(place, count);
    return { place: count === 1 ? place : `${place} (${count})`, value };
  });
}

const prefixed = (prefix: string, rows: readonly Row[]) =>
  rows.map(({ place, value }) => ({ place: `${prefix}${place}`, value }));

function stencilRows({ dims, derivative, operator, offsets, weights, lhs }: StencilDefinition): Row[] {
  const of = operator
    ? Object.entries(operator)
        .map(([word, factor]) => `${signed(factor)} u_${word}`)
        .join(' + ')
    : `derivative ${derivative ?? 0}`;
  const side = (name: string, at: readonly Offset[], given: readonly string[] | null): Row[] =>
    given === null
      ? [{ place: `${name}s`, value: `those of highest order at ${at.map(offsetText).join('; ')}` }]
      : at.map((offset, k) => ({ place: `${name} at ${offsetText(offset)}`, value: signed(given[k] ?? '') }));
  return [
    { place: 'Dimensions', value: String(dims) },
    { place: 'Approximates', value: of },
    ...side('Weight', offsets, weights),
    ...(lhs ? side('Weight of the left side', lhs.offsets, lhs.weights) : []),
  ];
}

const list = (name: string, values: readonly string[], from = 1): Row[] =>
  values.map((value, k) => ({ place: `${name}${subscript(k + from)}`, value: signed(value) }));
const subscript = (figure: number) => [...String(figure)].map((one) => '₀₁₂₃₄₅₆₇₈₉'[Number(one)]).join('');

function timeRows(time: TimeMethod): Row[] {
  switch (time.kind) {
    case 'runge-kutta':
      return [
        { place: 'Kind of time method', value: 'Runge-Kutta' },
        ...time.A.flatMap((row, i) =>
          row.map((value, j) => ({ place: `a${subscript(i + 1)}${subscript(j + 1)}`, value: signed(value) })),
        ),
        ...list('b', time.b),
        ...list('c', time.c ?? []),
      ];
    case 'multistep':
      return [
        { place: 'Kind of time method', value: 'multistep' },
        ...list('α', time.alpha, 0),
        ...list('β', time.beta, 0),
      ];
    case 'imex-multistep':
      return [
        { place: 'Kind of time method', value: 'implicit-explicit multistep' },
        ...list('α', time.alpha, 0),
        ...list('β explicit ', time.beta_explicit, 0),
        ...list('β implicit ', time.beta_implicit, 0),
      ];
  }
}

interface Family {
  fixed?: Readonly<Record<string, string>>;
  path?: string;
}
const familyRows = ({ fixed, path }: Family): Row[] => [
  ...Object.entries(fixed ?? {}).map(([name, value]) => ({ place: `${name} held at`, value: signed(value) })),
  ...(path ? [{ place: 'Cut through the parameters', value: path }] : []),
];

/** One row a coefficient, in the order of the definition; every number as its author wrote it. */
export function definitionRows(definition: Definition): Row[] {
  if (definition.kind === 'stencil') return numbered(stencilRows(definition));
  if (definition.kind === 'time-method') return numbered(timeRows(definition.time));
  const head = [
    { place: 'Equation', value: definition.equation },
    { place: 'Form', value: definition.form },
  ];
  switch (definition.form) {
    case 'table':
      return numbered([
        ...head,
        ...definition.terms.map(({ level, offset, coefficient }) => ({
          place: siteText('u', level, offset),
          value: coefficient,
        })),
        ...familyRows(definition),
      ]);
    case 'lines':
      return numbered([
        ...head,
        ...definition.space.flatMap((stencil, k) =>
          prefixed(definition.space.length > 1 ? `Stencil ${k + 1}: ` : '', stencilRows(stencil)),
        ),
        ...timeRows(definition.time),
        ...familyRows(definition),
      ]);
    case 'system':
      return numbered([
        ...head,
        ...definition.equations.flatMap(({ terms }, k) =>
          prefixed(
            `Equation ${k + 1}: `,
            terms.map(({ unknown, level, offset, coefficient }) => ({
              place: siteText(unknown, level, offset),
              value: coefficient,
            })),
          ),
        ),
        ...familyRows(definition),
      ]);
  }
}
