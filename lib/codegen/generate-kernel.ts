/** The generator's door: a revision, a language and options in; a kernel, or the reason why there is none, out. */
import { formatFingerprint, textHash } from '@/lib/kernels/fingerprint';
import { describeKernel, type Described } from './kernel-view';
import { fillTemplate } from './kernel-source';
import {
  KERNEL_LANGUAGES,
  type GeneratedKernel,
  type KernelAnswer,
  type KernelInput,
  type KernelLanguage,
  type KernelOptions,
} from './kernel-request';
import { loadTemplate } from './load-template';

export { GENERATOR_RELEASE } from './generator-release';

const COMMENT: Readonly<Record<KernelLanguage, (text: string) => string>> = {
  c: (text) => `/* ${text} */`,
  fortran: (text) => `! ${text}`,
  python: (text) => `# ${text}`,
};
const SUFFIX: Readonly<Record<KernelLanguage, string>> = { c: 'c', fortran: 'f90', python: 'py' };

/** Options as they stand in the fingerprint: "double,periodic". */
export const optionsText = (options: KernelOptions) => `${options.precision},${options.boundary}`;

function notesOf(source: string, described: Described): GeneratedKernel['notes'] {
  const lines = source.split('\n');
  const header = source.slice(0, source.indexOf('release ')).split('\n').length;
  return described.notes.flatMap(({ anchor, text }) => {
    const line = lines.findIndex((l, k) => (k === 0 || k > header) && l.includes(anchor));
    return line < 0 ? [] : [{ line: line + 1, text }];
  });
}

/**
 * Source text of one revision in one language; the same input gives the same bytes.
 * @returns the kernel with its fingerprint, or a plain sentence where this kind of scheme has none yet
 */
export function generateKernel(input: KernelInput, language: KernelLanguage, options: KernelOptions): KernelAnswer {
  const answer = describeKernel(input, language, options);
  if (answer.kind === 'none') return answer;
  const described = answer.plan;
  const comment = COMMENT[language];
  const fill = (name: string, view: Described['view']) => {
    const file = `${name}.${SUFFIX[language]}`;
    return fillTemplate(`templates/${language}/${file}`, loadTemplate(language, file), view);
  };
  const head = fill('head', { lines: described.header.map((line) => ({ line })) });
  const below = `${head}${fill(described.template, described.view)}`;
  const fingerprint = formatFingerprint({
    slug: input.slug,
    revision: input.revision,
    language,
    options: optionsText(options),
    hash: textHash(below),
  });
  const source = `${comment(described.firstLine)}\n${comment(fingerprint)}\n${below}`;
  return {
    kind: 'kernel',
    kernel: {
      language,
      options,
      fileName: `${described.prefix}.${SUFFIX[language]}`,
      source,
      fingerprint,
      notes: notesOf(source, described),
    },
  };
}

/** Languages in which a kernel of this revision can be printed. */
export function availableLanguages(input: KernelInput): KernelLanguage[] {
  return KERNEL_LANGUAGES.filter(
    (language) => describeKernel(input, language, { precision: 'double', boundary: 'periodic' }).kind === 'plan',
  );
}
