/** Files that an author adds to a revision: derivations, plots, data. */
export const ATTACHMENT_BYTES_MAX = 10 * 1024 * 1024;
/** Files of one revision. */
export const ATTACHMENTS_MAX = 20;

export const ATTACHMENT_TYPES = ['application/pdf', 'image/png', 'image/svg+xml', 'text/csv'] as const;
export type AttachmentType = (typeof ATTACHMENT_TYPES)[number];

export const TYPE_NAMES = {
  'application/pdf': 'PDF',
  'image/png': 'PNG',
  'image/svg+xml': 'SVG',
  'text/csv': 'CSV',
} as const satisfies Record<AttachmentType, string>;

export const ACCEPTED = 'accepted: PDF, PNG, SVG and CSV up to 10 MB';

export interface AttachmentView {
  id: string;
  name: string;
  type: AttachmentType;
  bytes: number;
  sha256: string;
  by: string;
  at: string;
}

/** "12.4 kB" */
export function sizeText(bytes: number): string {
  if (bytes < 1000) return `${bytes} B`;
  return bytes < 1_000_000 ? `${(bytes / 1000).toFixed(1)} kB` : `${(bytes / 1_000_000).toFixed(1)} MB`;
}

/** A name that is safe in a list and in a header: without folders, controls and quotes; never empty. */
export function safeFileName(name: string): string {
  const last = name.split(/[/\\]/).at(-1) ?? '';
  const plain = last
    .normalize('NFC')
    .replace(/[\p{Cc}\p{Cf}"<>|:*?;]/gu, '')
    .trim()
    .replace(/^\.+/, '');
  return plain.slice(-120) || 'file';
}
