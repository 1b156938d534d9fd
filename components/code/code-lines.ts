/** Source text as lines of marked-up HTML, in the classes of the book's token palette. */
import { createHighlighterCore, type HighlighterCore, type ThemeRegistration } from 'shiki/core';
import { createJavaScriptRegexEngine } from 'shiki/engine/javascript';
import type { KernelLanguage } from '@/lib/codegen/kernel-request';

/** Colours that no page shows: each stands for a class, since the page decides what day and night look like. */
const CLASS_OF_COLOUR: Readonly<Record<string, string>> = {
  '#000001': 'k',
  '#000002': 'ty',
  '#000003': 'nu',
  '#000004': 'st',
  '#000005': 'co',
};

const THEME: ThemeRegistration = {
  name: 'levelbook',
  type: 'light',
  colors: { 'editor.foreground': '#000000', 'editor.background': '#ffffff' },
  settings: [
    { settings: { foreground: '#000000' } },
    {
      scope: ['keyword', 'storage.modifier', 'storage.type.function', 'storage.type.class'],
      settings: { foreground: '#000001' },
    },
    { scope: ['keyword.operator', 'keyword.other.attribute'], settings: { foreground: '#000000' } },
    { scope: ['keyword.operator.logical.python', 'keyword.operator.new'], settings: { foreground: '#000001' } },
    { scope: ['storage.type', 'support.type', 'entity.name.type'], settings: { foreground: '#000002' } },
    { scope: ['storage.type.function.python', 'storage.type.class.python'], settings: { foreground: '#000001' } },
    { scope: ['constant.numeric', 'constant.language'], settings: { foreground: '#000003' } },
    { scope: ['string', 'punctuation.definition.string'], settings: { foreground: '#000004' } },
    {
      scope: ['comment', 'punctuation.definition.comment', 'string.quoted.docstring'],
      settings: { foreground: '#000005' },
    },
  ],
};

const GRAMMARS = { c: 'c', fortran: 'fortran-free-form', python: 'python' } as const satisfies Record<
  KernelLanguage,
  string
>;

// Kept on the process: the development server loads this module anew at each change, the grammars it need not.
const kept = globalThis as typeof globalThis & { levelbookHighlighter?: Promise<HighlighterCore> };

const highlighter = () =>
  (kept.levelbookHighlighter ??= createHighlighterCore({
    themes: [THEME],
    langs: [import('@shikijs/langs/c'), import('@shikijs/langs/fortran-free-form'), import('@shikijs/langs/python')],
    engine: createJavaScriptRegexEngine(),
  }));

const escaped = (text: string) => text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;');

/**
 * @param source   the kernel's text
 * @param language its language
 * @returns the marked-up content of each line; all text is escaped
 */
export async function markedLines(source: string, language: KernelLanguage): Promise<string[]> {
  const { codeToTokensBase } = await highlighter();
  // No time limit: on a cold engine a slow first line would give the rest of the block the state it ended in.
  const lines = codeToTokensBase(source.replace(/\n$/, ''), {
    lang: GRAMMARS[language],
    theme: THEME.name ?? '',
    tokenizeTimeLimit: 0,
  });
  return lines.map((tokens) =>
    tokens
      .map(({ content, color }) => {
        const look = CLASS_OF_COLOUR[color?.toLowerCase() ?? ''];
        return look ? `<span class="${look}">${escaped(content)}</span>` : escaped(content);
      })
      .join(''),
  );
}

/** @returns one `<span class="cl">` a line, numbered from 1 */
export async function codeLines(source: string, language: KernelLanguage): Promise<string> {
  const lines = await markedLines(source, language);
  return lines.map((line, index) => `<span class="cl" data-n="${index + 1}">${line}</span>`).join('');
}
