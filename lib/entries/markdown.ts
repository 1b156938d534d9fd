/** Notes in Markdown as HTML: no HTML of the author's own, no images, links that lead where they say. */
import MarkdownIt from 'markdown-it';

/** Addresses that a link may have; everything else stays text. */
const LINK = /^(https?:\/\/|mailto:[^?]+$|\/(?!\/)|#)/i;

const markdown = new MarkdownIt({ html: false, linkify: false, typographer: false }).disable(['image']);
markdown.validateLink = (address) => LINK.test(address.trim());

const plainLinkOpen =
  markdown.renderer.rules.link_open ?? ((tokens, at, options, _env, self) => self.renderToken(tokens, at, options));
markdown.renderer.rules.link_open = (tokens, at, options, env, self) => {
  const token = tokens[at];
  token?.attrSet('rel', 'noopener noreferrer nofollow ugc');
  return plainLinkOpen(tokens, at, options, env, self);
};
// A page has its own first headings; those of notes stand below them.
for (const rule of ['heading_open', 'heading_close'] as const)
  markdown.renderer.rules[rule] = (tokens, at, options, _env, self) => {
    const token = tokens[at]!;
    token.tag = `h${Math.min(6, Number(token.tag.slice(1)) + 2)}`;
    return self.renderToken(tokens, at, options);
  };

export const markdownHtml = (text: string): string => markdown.render(text);
