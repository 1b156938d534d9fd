/** Programs that race a generated kernel against its textbook form and an own triad, in one process, round by round. */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { BUILD_FLAGS } from '@/lib/codegen/compile-flags';
import { generateKernel } from '@/lib/codegen/generate-kernel';
import { kernelPrefix } from '@/lib/codegen/scheme-words';
import { PERIODIC } from '../kernels/build-kernel';
import { kernelInput, type KernelCase } from '../kernels/kernel-cases';
import { textbookForm, type TextbookForm } from '../kernels/textbook-form';

/** Classical RK4 with fourth-order differences as textbooks write it: four slopes, neighbours by `%`. */
const TEXTBOOK_RK4: TextbookForm = {
  parameters: ['lam'],
  levels: 1,
  c: `#include <stddef.h>
#include <stdlib.h>
static void slope(ptrdiff_t n, double lam, const double *u, double *k)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        k[i] = -lam*(u[(i + n - 2) % n] - 8.0*u[(i + n - 1) % n] + 8.0*u[(i + 1) % n] - u[(i + 2) % n])/12.0;
}
void textbook(ptrdiff_t steps, ptrdiff_t n, double lam, double *level[2]);
void textbook(ptrdiff_t steps, ptrdiff_t n, double lam, double *level[2])
{
    double *u = level[0], *y = malloc((size_t)n*sizeof *y), *k[4];
    for (int j = 0; j < 4; ++j)
        k[j] = malloc((size_t)n*sizeof(double));
    for (ptrdiff_t s = 0; s < steps; ++s) {
        slope(n, lam, u, k[0]);
        for (ptrdiff_t i = 0; i < n; ++i) y[i] = u[i] + k[0][i]/2.0;
        slope(n, lam, y, k[1]);
        for (ptrdiff_t i = 0; i < n; ++i) y[i] = u[i] + k[1][i]/2.0;
        slope(n, lam, y, k[2]);
        for (ptrdiff_t i = 0; i < n; ++i) y[i] = u[i] + k[2][i];
        slope(n, lam, y, k[3]);
        for (ptrdiff_t i = 0; i < n; ++i) u[i] = u[i] + (k[0][i] + 2.0*k[1][i] + 2.0*k[2][i] + k[3][i])/6.0;
    }
    free(y);
    for (int j = 0; j < 4; ++j)
        free(k[j]);
}
`,
  python: `import numpy as np

def slope(u, lam):
    return -lam*(np.roll(u, 2) - 8.0*np.roll(u, 1) + 8.0*np.roll(u, -1) - np.roll(u, -2))/12.0

def textbook(steps, levels, lam):
    u = levels[0]
    for _ in range(steps):
        k1 = slope(u, lam)
        k2 = slope(u + k1/2.0, lam)
        k3 = slope(u + k2/2.0, lam)
        k4 = slope(u + k3, lam)
        u = u + (k1 + 2.0*k2 + 2.0*k3 + k4)/6.0
    return [u]
`,
};

const formOf = (name: KernelCase) => (name === 'rk4c4' ? TEXTBOOK_RK4 : textbookForm(kernelInput(name)));

function raceSource(prefix: string, parameter: number, levels: number): string {
  const PREFIX = prefix.toUpperCase();
  return `#include "${prefix}.c"
#include "textbook.c"
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

static double now(void)
{
    struct timespec t;
    timespec_get(&t, TIME_UTC);
    return (double)t.tv_sec + 1e-9*(double)t.tv_nsec;
}

static double *field(ptrdiff_t n)
{
    double *const u = malloc((size_t)n*sizeof *u);
    for (ptrdiff_t i = 0; i < n; ++i)
        u[i] = 1.0 + 0.01*(double)(i % 7);
    return u;
}

static void triad(ptrdiff_t n, double *restrict a, const double *restrict b, const double *restrict c)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        a[i] = b[i] + 0.5*c[i];
}

/* Best seconds a point and step of kernel and textbook form, and a point of the triad. */
int main(int argc, char **argv)
{
    for (int k = 1; k < argc; ++k) {
        const ptrdiff_t n = atol(argv[k]);
        double *level[${PREFIX}_ARRAYS], *book[${levels + 1}], *a = field(n), *b = field(n), *c = field(n);
        for (int j = 0; j < ${PREFIX}_ARRAYS; ++j)
            level[j] = field(${prefix}_length(n));
        for (int j = 0; j < ${levels + 1}; ++j)
            book[j] = field(n);
        const ptrdiff_t fast = 1 + 6000000/n, slow = 1 + 400000/n;
        double best[3] = {1e30, 1e30, 1e30};
        for (int round = 0; round < 7; ++round) {
            double since = now();
            if (${prefix}_run(fast, n, ${parameter}, level) != 0)
                return 1;
            double each = (now() - since)/(double)fast/(double)n;
            best[0] = each < best[0] ? each : best[0];
            since = now();
            textbook(slow, n, ${parameter}, book);
            each = (now() - since)/(double)slow/(double)n;
            best[1] = each < best[1] ? each : best[1];
            since = now();
            for (ptrdiff_t s = 0; s < fast; ++s) {
                triad(n, a, b, c);
                double *const other = a;
                a = c;
                c = other;
            }
            each = (now() - since)/(double)fast/(double)n;
            best[2] = each < best[2] ? each : best[2];
        }
        printf("%ld %.6e %.6e %.6e %g\\n", (long)n, best[0], best[1], best[2], a[n/2] + book[0][0]);
        free(a);
        free(b);
        free(c);
        for (int j = 0; j < ${PREFIX}_ARRAYS; ++j)
            free(level[j]);
        for (int j = 0; j < ${levels + 1}; ++j)
            free(book[j]);
    }
    return 0;
}
`;
}

function rollSource(prefix: string, parameter: number, levels: number): string {
  return `import sys, time
import numpy as np
import ${prefix} as kernel
from textbook import textbook

# Best seconds a point and step of the kernel and of the np.roll expression.
for n in map(int, sys.argv[1:]):
    pattern = 1.0 + 0.01*(np.arange(n) % 7)
    book = [pattern.copy() for _ in range(${levels})]
    arrays = [np.ones(kernel.length(n)) for _ in range(kernel.ARRAYS)]
    for u in arrays:
        u[kernel.HALO_LEFT:kernel.HALO_LEFT + n] = pattern
    fast, slow = 1 + 2_000_000//n, 1 + 400_000//n
    best = [1e30, 1e30]
    for _ in range(5):
        since = time.perf_counter()
        arrays = kernel.run(fast, arrays, ${parameter})
        best[0] = min(best[0], (time.perf_counter() - since)/fast/n)
        since = time.perf_counter()
        textbook(slow, book, ${parameter})
        best[1] = min(best[1], (time.perf_counter() - since)/slow/n)
    print(n, *best)
`;
}

function output(program: string, args: readonly string[], cwd: string): number[][] {
  const { stdout, stderr, status, error } = spawnSync(program, args, { cwd, encoding: 'utf8' });
  if (error) throw error;
  if (status !== 0) throw new Error(`${program}: exit status ${status}: ${stderr}`);
  return stdout
    .trim()
    .split('\n')
    .map((line) => line.split(' ').map(Number));
}

export interface Race {
  readonly n: number;
  /** Seconds a point and step. */
  readonly kernel: number;
  readonly textbook: number;
  /** Seconds a point of a = b + s c. */
  readonly triad: number;
}

/** The C kernel against its textbook form and the triad, best of seven interleaved rounds. */
export function raceInC(name: KernelCase, parameter: number, sizes: readonly number[]): Race[] {
  const input = kernelInput(name);
  const answer = generateKernel(input, 'c', PERIODIC);
  if (answer.kind === 'none') throw new Error(answer.reason);
  const folder = mkdtempSync(path.join(tmpdir(), 'levelbook-race-'));
  try {
    const { c, levels } = formOf(name);
    writeFileSync(path.join(folder, answer.kernel.fileName), answer.kernel.source);
    writeFileSync(path.join(folder, 'textbook.c'), c);
    writeFileSync(path.join(folder, 'race.c'), raceSource(kernelPrefix(input.callNumber), parameter, levels));
    const { compiler, release, libraries } = BUILD_FLAGS.c;
    const built = spawnSync(compiler, [...release, 'race.c', '-o', 'race', ...libraries], {
      cwd: folder,
      encoding: 'utf8',
    });
    if (built.status !== 0) throw new Error(built.stderr);
    return output(path.join(folder, 'race'), sizes.map(String), folder).map(([n, kernel, textbook, triad]) => ({
      n: n!,
      kernel: kernel!,
      textbook: textbook!,
      triad: triad!,
    }));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** The Python kernel against the np.roll expression, best of five interleaved rounds. */
export function raceInPython(name: KernelCase, parameter: number, sizes: readonly number[]): Omit<Race, 'triad'>[] {
  const input = kernelInput(name);
  const answer = generateKernel(input, 'python', PERIODIC);
  if (answer.kind === 'none') throw new Error(answer.reason);
  const folder = mkdtempSync(path.join(tmpdir(), 'levelbook-race-'));
  try {
    const { python, levels } = formOf(name);
    writeFileSync(path.join(folder, answer.kernel.fileName), answer.kernel.source);
    writeFileSync(path.join(folder, 'textbook.py'), python);
    writeFileSync(path.join(folder, 'race.py'), rollSource(kernelPrefix(input.callNumber), parameter, levels));
    return output('/usr/bin/python3', ['race.py', ...sizes.map(String)], folder).map(([n, kernel, textbook]) => ({
      n: n!,
      kernel: kernel!,
      textbook: textbook!,
    }));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
