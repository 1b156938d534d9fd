/** Definitions as JSON text: read with the place of what is wrong, as a line where the text itself cannot be parsed. */
import { readDefinition } from '@/lib/facts/definition-shape';
import { callLettersOf } from './call-number';
import type { Definition } from './definition';
import { FILE_CHARACTERS_MAX, type FileOutcome, type LineError } from './definition-csv';

export const definitionJson = (definition: Definition) => `${JSON.stringify(definition, null, 2)}\n`;

const lineOf = (text: string, at: number) => text.slice(0, at).split('\n').length;

function syntaxError(text: string, error: unknown): LineError {
  const message = error instanceof Error ? error.message : '';
  const position = /position (\d+)/.exec(message)?.[1];
  const line = /line (\d+)/.exec(message)?.[1];
  return {
    line: position ? lineOf(text, Number(position)) : line ? Number(line) : lineOf(text, text.length),
    message: 'this is not JSON; accepted: a definition such as {"kind": "stencil", …}',
  };
}

/**
 * The line on which the value at a JSON pointer begins; 0 where it cannot be found. The text is walked key by key,
 * so that a name that comes twice is not mistaken.
 */
function lineOfPointer(text: string, pointer: string): number {
  const keys = pointer.split('/').slice(1);
  let at = 0;
  for (const key of keys) {
    if (/^\d+$/.test(key)) {
      const open = text.indexOf('[', at);
      if (open < 0) return lineOf(text, at);
      at = elementAt(text, open + 1, Number(key));
    } else {
      const found = text.indexOf(`"${key}"`, at);
      if (found < 0) return lineOf(text, at);
      at = found + key.length + 2;
    }
  }
  return lineOf(text, at);
}

/** Start of the k-th element of a list whose first one begins at `from`. */
function elementAt(text: string, from: number, k: number): number {
  let depth = 0;
  let seen = 0;
  let quoted = false;
  let at = from;
  for (; at < text.length && seen < k; at++) {
    const sign = text[at]!;
    if (sign === '"' && text[at - 1] !== '\\') quoted = !quoted;
    if (quoted) continue;
    if (sign === '[' || sign === '{') depth++;
    else if (sign === ']' || sign === '}') depth--;
    else if (sign === ',' && depth === 0) seen++;
  }
  return at + (/^\s*/.exec(text.slice(at))?.[0].length ?? 0);
}

/** @param into the definition in whose place it comes: one under other letters is refused */
export function readDefinitionJson(text: string, into: Definition): FileOutcome {
  if (text.length > FILE_CHARACTERS_MAX)
    return {
      errors: [
        { line: 0, message: `the file has ${text.length} characters; accepted: at most ${FILE_CHARACTERS_MAX}` },
      ],
    };
  let input: unknown;
  try {
    input = JSON.parse(text.replace(/^\uFEFF/, ''));
  } catch (error) {
    return { errors: [syntaxError(text, error)] };
  }
  const { definition, problems } = readDefinition(input);
  if (!definition)
    return {
      errors: problems.map(({ pointer, message }) => ({
        line: lineOfPointer(text, pointer),
        message: `${pointer === '' ? '' : `${pointer}: `}${message}`,
      })),
    };
  const [letters, due] = [callLettersOf(definition), callLettersOf(into)];
  const equations = [definition, into].map((one) => (one.kind === 'scheme' ? one.equation : ''));
  if (letters !== due || equations[0] !== equations[1])
    return {
      errors: [
        {
          line: 1,
          message: `this is booked under ${letters}${equations[0] && `, ${equations[0]}`}; accepted in this draft: ${due}${equations[1] && `, ${equations[1]}`}`,
        },
      ],
    };
  return { definition };
}
