import 'server-only';
import { generateKernel } from '@/lib/codegen/generate-kernel';
import { KERNEL_LANGUAGES, type KernelInput, type KernelLanguage, KernelOptions } from '@/lib/codegen/kernel-request';

/** Languages of which the generator can print a kernel, with every option at its default. */
export function printableLanguages(input: KernelInput): KernelLanguage[] {
  const options = KernelOptions.parse({});
  return KERNEL_LANGUAGES.filter((language) => generateKernel(input, language, options).kind === 'kernel');
}
