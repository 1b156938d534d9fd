/** The periodic fill of ghost cells, in every language. */
import type { KernelLanguage } from './kernel-request';

type Halo = readonly [number, number];

function cLines([left, right]: Halo): string[] {
  const plus = (k: number) => (k === 0 ? '' : ` + ${k}`);
  return [
    ...Array.from({ length: left }, (_, k) => `u[${k}] = u[n${plus(k)}];`),
    ...Array.from({ length: right }, (_, k) => `u[n${plus(left + k)}] = u[${left + k}];`),
  ];
}

function fortranLines([left, right]: Halo): string[] {
  return [
    ...Array.from({ length: left }, (_, k) => `u(${-k}) = u(${k === 0 ? 'n' : `n-${k}`})`),
    ...Array.from({ length: right }, (_, k) => `u(n+${k + 1}) = u(${k + 1})`),
  ];
}

function pythonLines([left, right]: Halo): string[] {
  const lines: string[] = [];
  if (left === 1) lines.push(`u[0] = u[${-right - 1}]`);
  else if (left > 1) lines.push(`u[:${left}] = u[${-left - right}:${right === 0 ? '' : -right}]`);
  if (right === 1) lines.push(`u[-1] = u[${left}]`);
  else if (right > 1) lines.push(`u[-${right}:] = u[${left === 0 ? '' : left}:${left + right}]`);
  return lines;
}

/** Statements that copy the ghost cells of a periodic row u of n points. */
export function haloLines(language: KernelLanguage, halo: Halo): string {
  const without = {
    c: '(void)n;\n(void)u;  /* no ghost cells */',
    fortran: 'associate (unused => u)\nend associate  ! no ghost cells',
    python: 'del u  # no ghost cells',
  };
  const lines = { c: cLines, fortran: fortranLines, python: pythonLines }[language](halo);
  return lines.length > 0 ? lines.join('\n') : without[language];
}

/** Bounds of a Fortran array with ghost cells: "0:n+1". */
export const haloExtent = ([left, right]: Halo, n = 'n') => `${1 - left}:${right === 0 ? n : `${n}+${right}`}`;

const plus = (size: string, k: number) => (k === 0 ? size : `${size} + ${k}`);

/** Rows first; then whole rows, and whole planes, are copied together with what they hold in their own ghost cells. */
function cGridLines([x, y, z]: readonly Halo[]): string[] {
  const indent = (lines: readonly string[]) => lines.map((line) => `    ${line}`);
  const times = (count: number, stride: string) => (count === 1 ? stride : `${count}*${stride}`);
  const bytes = (count: number, stride: string) => `(size_t)(${times(count, stride)})*sizeof *u`;
  const copies = (base: string, size: string, stride: string, [left, right]: Halo) => [
    ...(left > 0 ? [`memcpy(${base}, ${base} + ${size}*${stride}, ${bytes(left, stride)});`] : []),
    ...(right > 0
      ? [
          `memcpy(${base} + ${left === 0 ? size : `(${plus(size, left)})`}*${stride}, ${left === 0 ? base : `${base} + ${times(left, stride)}`}, ${bytes(right, stride)});`,
        ]
      : []),
  ];
  const plane = (base: string) => [
    `for (ptrdiff_t j = ${y![0]}; j < ${plus('ny', y![0])}; ++j) {`,
    `    double *const x = ${base} + j*row;`,
    ...indent(cLines(x!).map((line) => line.replaceAll('u[', 'x[').replaceAll('[n', '[nx'))),
    '}',
    ...copies(base, 'ny', 'row', y!),
  ];
  if (!z) return plane('u');
  return [
    `for (ptrdiff_t k = ${z[0]}; k < ${plus('nz', z[0])}; ++k) {`,
    '    double *const p = u + k*plane;',
    ...indent(plane('p')),
    '}',
    ...copies('u', 'nz', 'plane', z),
  ];
}

/** Sections along one axis; the axes before it are copied with their ghost cells. */
function fortranGridLines(halos: readonly Halo[]): string[] {
  return halos.flatMap(([left, right], axis) => {
    const n = `n${'xyz'[axis]!}`;
    const section = (own: string) =>
      `u(${halos.map((_, k) => (k < axis ? ':' : k === axis ? own : `1:n${'xyz'[k]!}`)).join(', ')})`;
    const copy = (to: string, from: string) => `${section(to)} = ${section(from)}`;
    return [
      ...(left === 1 ? [copy('0', n)] : left > 1 ? [copy(`${1 - left}:0`, `${n}-${left - 1}:${n}`)] : []),
      ...(right === 1 ? [copy(`${n}+1`, '1')] : right > 1 ? [copy(`${n}+1:${n}+${right}`, `1:${right}`)] : []),
    ];
  });
}

function pythonGridLines(halos: readonly Halo[]): string[] {
  const inner = ([left, right]: Halo) => `${left === 0 ? '' : left}:${right === 0 ? '' : -right}`;
  return halos.flatMap(([left, right], axis) => {
    const section = (own: string) =>
      `u[${halos
        .map((halo, k) => (k < axis ? ':' : k === axis ? own : inner(halo)))
        .reverse()
        .join(', ')}]`;
    const copy = (to: string, from: string) => `${section(to)} = ${section(from)}`;
    return [
      ...(left > 0 ? [copy(`:${left}`, `${-left - right}:${right === 0 ? '' : -right}`)] : []),
      ...(right > 0 ? [copy(`-${right}:`, `${left}:${left + right}`)] : []),
    ];
  });
}

/** Statements that copy the ghost cells of a periodic grid, corners included. */
export const gridHaloLines = (language: KernelLanguage, halos: readonly Halo[]) =>
  ({ c: cGridLines, fortran: fortranGridLines, python: pythonGridLines })[language](halos).join('\n');
