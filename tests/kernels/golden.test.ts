import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { generateKernel } from '@/lib/codegen/generate-kernel';
import { KERNEL_LANGUAGES } from '@/lib/codegen/kernel-request';
import { PERIODIC } from './build-kernel';
import { kernelInput, type KernelCase } from './kernel-cases';

const GOLDEN: KernelCase[] = [
  'leapfrog2',
  'laxWendroff',
  'heat',
  'duFortFrankel',
  'wave',
  'rk4c4',
  'ab3c2',
  'heat2d',
  'wave3d4',
  'cornerTransport',
  'leapfrog2d',
  'firstCentral4',
  'firstStaggered4',
  'rk4',
  'ab3',
];

// UPDATE_GOLDEN=1 writes the files anew; the change is then read like any other.
describe.each(KERNEL_LANGUAGES)('the %s kernel', (language) => {
  it.each(GOLDEN)('of %s is the text that was read and accepted', (name) => {
    const answer = generateKernel(kernelInput(name), language, PERIODIC);
    if (answer.kind === 'none') throw new Error(answer.reason);
    const folder = path.join(import.meta.dirname, 'golden', language);
    const file = path.join(folder, answer.kernel.fileName);
    if (process.env.UPDATE_GOLDEN === '1') {
      mkdirSync(folder, { recursive: true });
      writeFileSync(file, answer.kernel.source);
    }
    expect(existsSync(file), `${file} is missing: run with UPDATE_GOLDEN=1 and read it`).toBe(true);
    expect(answer.kernel.source).toBe(readFileSync(file, 'utf8'));
  });
});
