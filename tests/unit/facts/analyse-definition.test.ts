import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { describe, expect, it, vi } from 'vitest';
import { createBudget } from '@/lib/numerics/budget';
import { Definition } from '@/lib/entries/definition';
import { analyseDefinition } from '@/lib/facts/analyse-definition';
import { Analysis, type SchemeFacts } from '@/lib/facts/facts';
import { FactsSummary } from '@/lib/facts/facts-summary';
import { summarise } from '@/lib/facts/summarise';
import { referenceValues } from '../../support/reference-values';

// A busy machine is no failure.
vi.setConfig({ testTimeout: 60_000 });

const central = { kind: 'stencil', dims: 1, derivative: 1, offsets: ['-1', '0', '1'], weights: null };
const leapfrog = {
  kind: 'scheme',
  equation: 'advection',
  form: 'lines',
  space: [central],
  time: { kind: 'multistep', alpha: ['-1', '0', '1'], beta: ['0', '2', '0'] },
};
const table = (equation: string, terms: [number, number | number[], string][], more: object = {}) => ({
  kind: 'scheme',
  equation,
  form: 'table',
  terms: terms.map(([level, offset, coefficient]) => ({ level, offset, coefficient })),
  ...more,
});
const schemeFacts = (definition: unknown) => {
  const { facts } = analyseDefinition(definition);
  if (facts?.kind !== 'scheme') throw new Error('no facts of a scheme');
  return facts as SchemeFacts;
};

describe('the analysis of a definition', () => {
  it('gives the readings of the leapfrog scheme that its sheet shows', () => {
    const facts = schemeFacts(leapfrog);
    expect(facts).toMatchObject({
      levels: 3,
      startUpSteps: 1,
      halo: [[1, 1]],
      storage: { arraysInPlace: 2, explicit: true },
      cost: { operations: 3, additions: 2, multiplications: 1, loads: 2, stores: 1, bytesDouble: 24, bytesSingle: 12 },
      order: { pT: 2, pX: 2 },
      stability: {
        verdict: 'conditionally stable',
        intervals: [{ loExact: '-1', hiExact: '1', loIncluded: false, hiIncluded: false }],
      },
    });
    expect(facts.order.meaning).toContain('lag behind');
  });

  it('answers in the shape of its schema, and its summary likewise', () => {
    for (const { definition } of referenceValues<{ definition: unknown }[]>('scheme-storage.json').slice(0, 12)) {
      const analysis = analyseDefinition(definition);
      expect(Analysis.safeParse(analysis).error?.issues ?? []).toEqual([]);
      const summary = summarise(Definition.parse(definition), analysis.facts!);
      expect(FactsSummary.safeParse(summary).error?.issues ?? []).toEqual([]);
      expect(summary.curves?.modulus).toHaveLength(25);
    }
  });

  it('reads the same scheme from a table, from lines, and with its denominators left in', () => {
    const richardson = (text: string) =>
      table('diffusion', [
        [1, 0, '1'],
        [0, -1, text],
        [0, 1, text],
        [-1, 0, '-(1-2*r)/(1+2*r)'],
      ]);
    const divided = schemeFacts(richardson('-2*r/(1+2*r)'));
    const cleared = schemeFacts(
      table('diffusion', [
        [1, 0, '1+2*r'],
        [0, -1, '-2*r'],
        [0, 1, '-2*r'],
        [-1, 0, '2*r-1'],
      ]),
    );
    expect(divided).toEqual(cleared);
  });

  it('holds family numbers fixed: theta = 1/2 is the Crank-Nicolson scheme', () => {
    const family = (theta: string) =>
      schemeFacts(
        table(
          'diffusion',
          [
            [1, -1, '-theta*r'],
            [1, 0, '1+2*theta*r'],
            [1, 1, '-theta*r'],
            [0, -1, '-(1-theta)*r'],
            [0, 0, '-1+2*(1-theta)*r'],
            [0, 1, '-(1-theta)*r'],
          ],
          { fixed: { theta } },
        ),
      );
    expect(family('1/2').order).toMatchObject({ pT: 2, pX: 2 });
    expect(family('1/4').order).toMatchObject({ pT: 1, pX: 2, specialValues: [{ value: '1/3', order: 4 }] });
    expect(family('1/4').stability.intervals).toMatchObject([{ hiExact: '1' }]);
  });

  it('cuts several parameters along a path', () => {
    const donor = (path: string) =>
      schemeFacts(
        table(
          'advection-2d',
          [
            [1, [0, 0], '1'],
            [0, [-1, 0], '-lambda_x'],
            [0, [0, -1], '-lambda_y'],
            [0, [0, 0], 'lambda_x+lambda_y-1'],
          ],
          { path },
        ),
      );
    expect(donor('lambda_x=lambda_y').stability).toMatchObject({
      parameter: 'lambda',
      intervals: [{ hiExact: '1/2' }],
    });
    expect(donor('lambda_x=2*lambda_y').stability).toMatchObject({
      parameter: 'lambda_y',
      intervals: [{ hiExact: '1/3' }],
    });
  });

  it('keeps the orders in time and space of the scheme that is cut or whose numbers are fixed', () => {
    const ftcs: [number, number, string][] = [
      [1, 0, '1'],
      [0, -1, '-lambda/2-r'],
      [0, 0, '2*r-1'],
      [0, 1, 'lambda/2-r'],
    ];
    for (const more of [{ path: 'r=lambda/2' }, { fixed: { r: '1/4' } }, { fixed: { r: '1/4', lambda: '1/2' } }])
      expect(schemeFacts(table('advection-diffusion', ftcs, more)).order).toMatchObject({ pT: 1, pX: 2 });
  });

  it('takes the common symbol for all directions alike', () => {
    const heat = schemeFacts(
      table('diffusion-2d', [
        [1, [0, 0], '1'],
        [0, [-1, 0], '-r'],
        [0, [1, 0], '-r'],
        [0, [0, -1], '-r'],
        [0, [0, 1], '-r'],
        [0, [0, 0], '4*r-1'],
      ]),
    );
    expect(heat.stability).toMatchObject({ parameter: 'r', intervals: [{ hiExact: '1/4' }] });
  });

  it('takes a method printed in decimals as its author meant it where the digits alone would spoil it', () => {
    // Spiteri & Ruuth, SIAM J. Numer. Anal. 40 (2002) 469-491, method SSPRK(5,4) in 15 decimals (from memory).
    const A = [
      ['0', '0', '0', '0', '0'],
      ['0.391752226571890', '0', '0', '0', '0'],
      ['0.217669096261169', '0.368410593050371', '0', '0', '0'],
      ['0.082692086657811', '0.139958502191895', '0.251891774271694', '0', '0'],
      ['0.067966283637115', '0.115034698504632', '0.207034898597386', '0.544974750228521', '0'],
    ];
    const b = ['0.146811876084786', '0.248482909444976', '0.104258830331981', '0.274438900901350', '0.226007483236906'];
    const definition = { ...leapfrog, time: { kind: 'runge-kutta', A, b } };
    const analysis = analyseDefinition(definition);
    expect(analysis).toMatchObject({
      verdict: 'facts',
      problems: [{ severity: 'warning', code: 'nominally-consistent' }],
    });
    const facts = analysis.facts as SchemeFacts;
    expect(facts.order).toMatchObject({ consistent: true, pT: 4, pX: 2 });
    expect(facts.timeMethod).toMatchObject({ orderLinear: 0, orderNominal: 4 });
    expect(facts.stability.verdict).toBe('conditionally stable');
    expect(summarise(Definition.parse(definition), facts).orderTime).toBe(4);
  });

  it('sweeps against the reads where the oldest level may be written over', () => {
    const upwind = schemeFacts(
      table('advection', [
        [1, 0, '1'],
        [0, 0, 'lambda-1'],
        [0, -1, '-lambda'],
      ]),
    );
    expect(upwind.storage).toMatchObject({ arraysInPlace: 1, sweep: ['descending'] });
    expect(upwind.cost.bytesDouble).toBe(16);
    const downwind = schemeFacts(
      table('advection', [
        [1, 0, '1'],
        [0, 0, '-lambda-1'],
        [0, 1, 'lambda'],
      ]),
    );
    expect(downwind.storage).toMatchObject({ arraysInPlace: 1, sweep: ['ascending'] });
  });

  it('answers with everything but stability when its time is over or it is cancelled', () => {
    const abort = new AbortController();
    abort.abort();
    for (const budget of [createBudget({ timeLimitMs: 0 }), createBudget({ signal: abort.signal })]) {
      const { verdict, facts } = analyseDefinition(leapfrog, { budget });
      expect(verdict).toBe('facts');
      expect(facts).toMatchObject({
        order: { pT: 2 },
        stability: { verdict: 'not decided within the time budget' },
        dissipation: null,
      });
    }
  });

  it('stops on its way once it is cancelled, and keeps what it has', () => {
    const abort = new AbortController();
    const told: string[] = [];
    const onProgress = (_: number, stage: string) => {
      told.push(stage);
      if (stage === 'stability') abort.abort();
    };
    const { facts } = analyseDefinition(leapfrog, { budget: createBudget({ signal: abort.signal, onProgress }) });
    expect(told).toContain('stability');
    expect(facts).toMatchObject({
      order: { pT: 2 },
      stability: { verdict: 'not decided within the time budget', note: 'The analysis was cancelled.' },
      dissipation: null,
    });
  });

  it('ends a long analysis soon after its time', () => {
    const offsets = ['-4', '-3', '-2', '-1', '0', '1', '2', '3'];
    const hard = {
      kind: 'scheme',
      equation: 'advection',
      form: 'lines',
      space: [{ kind: 'stencil', dims: 1, derivative: 1, offsets, weights: null }],
      time: {
        kind: 'runge-kutta',
        A: [
          ['0', '0', '0', '0'],
          ['1/2', '0', '0', '0'],
          ['0', '1/2', '0', '0'],
          ['0', '0', '1', '0'],
        ],
        b: ['1/6', '1/3', '1/3', '1/6'],
      },
    };
    const processor = process.cpuUsage();
    const { facts } = analyseDefinition(hard, { budget: createBudget({ timeLimitMs: 20 }) });
    const { user, system } = process.cpuUsage(processor);
    expect(facts).toMatchObject({ order: { pT: 4, pX: 7 } });
    if (facts?.kind === 'scheme' && facts.stability.method !== 'exact')
      expect(facts.stability.verdict).toBe('not decided within the time budget');
    expect((user + system) / 1000).toBeLessThan(1500);
  });

  it('tells its progress up to the end', () => {
    const told: number[] = [];
    analyseDefinition(leapfrog, { budget: createBudget({ onProgress: (fraction) => told.push(fraction) }) });
    expect(told.at(-1)).toBe(1);
    expect([...told].sort((a, b) => a - b)).toEqual(told);
  });

  it('answers the points that can be read and reports the others', () => {
    const at: { parameters: Record<string, string>; theta: string[] }[] = [
      { parameters: { lambda: '1/2' }, theta: ['1/2*pi'] },
      { parameters: {}, theta: ['pi'] },
    ];
    const { samples, problems } = analyseDefinition(leapfrog, { at });
    expect(samples).toHaveLength(1);
    expect(samples?.[0]?.roots).toHaveLength(2);
    expect(problems).toMatchObject([{ pointer: '/at/1', severity: 'warning', code: 'bad-sample' }]);
  });
});

describe('npm run analyse', () => {
  const run = (args: string[], input = '') => {
    try {
      const command = ['--import', 'tsx', 'lib/facts/analyse-files.ts', ...args];
      const stdout = execFileSync(process.execPath, command, { input, encoding: 'utf8', stdio: 'pipe' });
      return { status: 0, stdout, stderr: '' };
    } catch (error) {
      const { status, stdout, stderr } = error as { status: number; stdout: string; stderr: string };
      return { status, stdout, stderr };
    }
  };

  it(
    'prints an array for one definition, for a list, and for points; and exits 1 where one is invalid',
    { timeout: 180_000 },
    () => {
      const folder = mkdtempSync(path.join(tmpdir(), 'analyse-'));
      try {
        const file = path.join(folder, 'several.json');
        const asked = { id: 'leap', definition: leapfrog, at: [{ parameters: { lambda: '1/2' }, theta: ['1/4*pi'] }] };
        writeFileSync(file, JSON.stringify([asked, { id: 'bad', definition: { kind: 'scheme' } }]));
        const several = run([file]);
        expect(several.status).toBe(1);
        const [first, second] = JSON.parse(several.stdout) as Record<string, unknown>[];
        expect(first).toMatchObject({
          id: 'leap',
          verdict: 'facts',
          samples: [{ roots: [expect.anything(), expect.anything()] }],
        });
        expect(second).toMatchObject({ id: 'bad', verdict: 'invalid', facts: null });
        const one = run(['-'], JSON.stringify(central));
        expect(one.status).toBe(0);
        expect(JSON.parse(one.stdout)).toMatchObject([{ verdict: 'facts', facts: { order: 2 } }]);
        const nothing = run([path.join(folder, 'absent.json')]);
        expect(nothing.status).toBe(1);
        expect(nothing.stderr).toContain('cannot be read (ENOENT)');
        expect(run(['-'], '{').stderr).toContain('is not JSON');
      } finally {
        rmSync(folder, { recursive: true });
      }
    },
  );
});
