import { markdownHtml } from '@/lib/entries/markdown';

/** People's notes, set from their Markdown; no HTML of theirs is let through. */
export const Markdown = ({ text }: { text: string }) => (
  <div className="prose" dangerouslySetInnerHTML={{ __html: markdownHtml(text) }} />
);
