/** The one file here that touches the disk: template text from `templates/<language>/`, read once. */
import { readFileSync } from 'node:fs';
import path from 'node:path';
import type { KernelLanguage } from './kernel-request';

const loaded = new Map<string, string>();

/**
 * @param name file name within the language's folder, such as "table.c"
 * @throws {Error} naming the file where it is missing (the process must run in the project's root)
 */
export function loadTemplate(language: KernelLanguage, name: string): string {
  const file = path.join(/* turbopackIgnore: true */ process.cwd(), 'templates', language, name);
  const present = loaded.get(file);
  if (present !== undefined) return present;
  const text = readFileSync(file, 'utf8');
  loaded.set(file, text);
  return text;
}
