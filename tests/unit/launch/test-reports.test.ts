import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { countPlaywright, countVitest } from '@/lib/launch/test-reports.mjs';

const folder = mkdtempSync(path.join(tmpdir(), 'reports-'));
afterAll(() => rmSync(folder, { recursive: true }));

function report(content: unknown): string {
  const file = path.join(folder, `${Math.random()}.json`);
  writeFileSync(file, JSON.stringify(content));
  return file;
}
const vitestFile = (status: string, ...tests: string[]) => ({
  status,
  assertionResults: tests.map((one) => ({ status: one })),
});
const playwright = (stats: object) => report({ stats: { expected: 0, unexpected: 0, flaky: 0, skipped: 0, ...stats } });

it('counts the tests of every file', () => {
  const file = report({
    testResults: [vitestFile('passed', 'passed', 'passed'), vitestFile('failed', 'passed', 'failed')],
  });
  expect(countVitest(file, 1)).toEqual({ passed: 3, failed: 1 });
});

it('counts a file that cannot be loaded as one failure', () => {
  const file = report({ testResults: [vitestFile('passed', 'passed'), vitestFile('failed')] });
  expect(countVitest(file, 1)).toEqual({ passed: 1, failed: 1 });
});

it.each(['skipped', 'pending', 'todo'])('counts a test that is %s as failed: it has shown nothing', (status) => {
  expect(countVitest(report({ testResults: [vitestFile('passed', 'passed', status)] }), 0)).toEqual({
    passed: 1,
    failed: 1,
  });
});

it('takes a project without tests for a failure', () => {
  expect(countVitest(report({ testResults: [] }), 0)).toEqual({ passed: 0, failed: 1 });
  expect(countPlaywright(playwright({}), 0)).toEqual({ passed: 0, failed: 1 });
});

it('takes a missing report for a failure', () => {
  expect(countVitest(path.join(folder, 'none.json'), 0)).toEqual({ passed: 0, failed: 1 });
  expect(countPlaywright(path.join(folder, 'none.json'), 0)).toEqual({ passed: 0, failed: 1 });
});

it('believes the exit status when every single test passed', () => {
  expect(countVitest(report({ testResults: [vitestFile('passed', 'passed')] }), 1)).toEqual({ passed: 1, failed: 1 });
  expect(countPlaywright(playwright({ expected: 4 }), 1)).toEqual({ passed: 4, failed: 1 });
});

it('counts a browser test that holds at its second try as passed', () => {
  expect(countPlaywright(playwright({ expected: 5, flaky: 1, unexpected: 2 }), 1)).toEqual({ passed: 6, failed: 2 });
});
