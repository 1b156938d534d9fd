/** The address of a kernel as a file, and what it asks for: /kernels/leapfrog-central-2/1/lb_ad003.c?precision=double */
import { type KernelLanguage, KernelOptions } from '@/lib/codegen/kernel-request';

// A Map: a plain object would also know the suffix "constructor".
const LANGUAGE_OF_SUFFIX: ReadonlyMap<string, KernelLanguage> = new Map([
  ['c', 'c'],
  ['f90', 'fortran'],
  ['py', 'python'],
]);
const SUFFIXES = [...LANGUAGE_OF_SUFFIX.keys()].map((suffix) => `.${suffix}`).join(', ');

export interface KernelAddress {
  slug: string;
  revision: number;
  fileName: string;
  language: KernelLanguage;
  options: KernelOptions;
}
export type KernelAddressAnswer =
  { ok: true; address: KernelAddress } | { ok: false; message: string; fields: Record<string, string> };

const refused = (message: string, field: string, accepted: string): KernelAddressAnswer => ({
  ok: false,
  message,
  fields: { [field]: accepted },
});

/** Reads path and query; every option that is not known, or not accepted, is named with what is. */
export function readKernelAddress(
  path: { slug: string; revision: string; file: string },
  query: URLSearchParams,
): KernelAddressAnswer {
  const revision = /^[1-9]\d{0,5}$/.test(path.revision) ? Number(path.revision) : null;
  if (revision === null)
    return refused(`"${path.revision}" is no revision number.`, 'revision', 'accepted: a number from 1');
  const language = LANGUAGE_OF_SUFFIX.get(/\.([a-z0-9]+)$/.exec(path.file)?.[1] ?? '');
  if (!language)
    return refused(
      `"${path.file}" is no kernel file. Kernels end in ${SUFFIXES}.`,
      'file',
      `accepted: a name that ends in ${SUFFIXES}`,
    );

  const known = Object.entries(KernelOptions.shape);
  const given: Record<string, string> = {};
  for (const [name, value] of query) {
    const schema = known.find(([option]) => option === name)?.[1];
    if (!schema)
      return refused(
        `There is no option "${name}".`,
        name,
        `accepted options: ${known.map(([option]) => option).join(', ')}`,
      );
    const values: readonly string[] = schema.unwrap().options;
    if (!values.includes(value))
      return refused(`Option ${name} cannot be "${value}".`, name, `accepted: ${values.join(', ')}`);
    given[name] = value;
  }
  const options = KernelOptions.parse(given);
  return { ok: true, address: { slug: path.slug, revision, fileName: path.file, language, options } };
}
