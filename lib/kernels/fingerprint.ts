/**
 * The fingerprint of a kernel: one line that names what it is, and the SHA-256 of every character below that line.
 * A kernel that was altered by one character no longer matches its own line.
 */
import { createHash } from 'node:crypto';

export interface Fingerprint {
  readonly slug: string;
  readonly revision: number;
  readonly language: string;
  /** "double,periodic" */
  readonly options: string;
  /** 64 lower-case hexadecimal digits. */
  readonly hash: string;
}

const LINE = /levelbook:([a-z0-9][a-z0-9-]*)\/(\d+)\/([a-z]+)\/([a-z0-9,-]+):([0-9a-f]{64})/;

/** SHA-256 of the text in UTF-8, as 64 hexadecimal digits. */
export const textHash = (text: string) => createHash('sha256').update(text, 'utf8').digest('hex');

export const formatFingerprint = ({ slug, revision, language, options, hash }: Fingerprint) =>
  `levelbook:${slug}/${revision}/${language}/${options}:${hash}`;

export type FingerprintCheck =
  /** The text carries no fingerprint line. */
  | { readonly kind: 'absent' }
  | { readonly kind: 'unaltered'; readonly fingerprint: Fingerprint }
  | { readonly kind: 'altered'; readonly fingerprint: Fingerprint; readonly found: string };

/** Reads the first fingerprint line of a text and compares it with what stands below. Line ends of any system are read as "\n". */
export function checkFingerprint(text: string): FingerprintCheck {
  const plain = text.replace(/\r\n?/g, '\n');
  const match = LINE.exec(plain);
  if (!match) return { kind: 'absent' };
  const [, slug, revision, language, options, hash] = match;
  const fingerprint = { slug: slug!, revision: Number(revision), language: language!, options: options!, hash: hash! };
  const end = plain.indexOf('\n', match.index);
  const found = textHash(end < 0 ? '' : plain.slice(end + 1));
  return found === hash ? { kind: 'unaltered', fingerprint } : { kind: 'altered', fingerprint, found };
}
