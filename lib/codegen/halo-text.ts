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
export const haloExtent = ([left, right]: Halo) => `${1 - left}:${right === 0 ? 'n' : `n+${right}`}`;
