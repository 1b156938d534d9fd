/** The driver that a trial compiles beside a kernel; it speaks the protocol of driver-protocol.ts. */
import { fillTemplate, type View } from './kernel-source';
import type { KernelInput, KernelLanguage, KernelOptions } from './kernel-request';
import { describeDriver } from './kernel-view';
import { loadTemplate } from './load-template';

const SUFFIX: Readonly<Record<KernelLanguage, string>> = { c: 'c', fortran: 'f90', python: 'py' };

export interface GeneratedDriver {
  /** "driver_lb_ad003.c"; it stands beside the kernel's file. */
  readonly fileName: string;
  readonly source: string;
}

/**
 * @returns the driver of the kernel that generateKernel prints for the same input
 * @throws {RangeError} where there is no kernel: ask generateKernel first
 */
export function generateDriver(input: KernelInput, language: KernelLanguage, options: KernelOptions): GeneratedDriver {
  const answer = describeDriver(input, language, options);
  if (answer.kind === 'none')
    throw new RangeError(`generateDriver: ${input.callNumber} has no kernel: ${answer.reason}`);
  const { prefix, template, view } = answer.plan;
  const suffix = SUFFIX[language];
  const fill = (name: string, values: View) => {
    const file = `${name}.${suffix}`;
    return fillTemplate(`templates/${language}/${file}`, loadTemplate(language, file), values);
  };
  const file = `${prefix}.${suffix}`;
  const reader = fill(
    'driver-reader',
    language === 'python' ? { file, module: prefix } : language === 'c' ? { file } : {},
  );
  return { fileName: `driver_${file}`, source: reader + fill(template, view) };
}
