import { describe, expect, it } from 'vitest';
import { markdownHtml } from '@/lib/entries/markdown';

describe('notes in Markdown', () => {
  it('are set: headings below those of the page, emphasis, lists, code, tables', () => {
    expect(markdownHtml('# Why\n\n- *a*\n- `b`')).toMatch(/<h3>Why<\/h3>\s*<ul>\s*<li><em>a<\/em>/);
    expect(markdownHtml('|a|b|\n|-|-|\n|1|2|')).toContain('<table>');
  });
  it.each([
    '<script>alert(1)</script>',
    '<img src=x onerror=alert(1)>',
    '<svg onload=alert(1)>',
    'a <b onmouseover="x()">b</b>',
    '<iframe src="https://a.example"></iframe>',
    '```html\n<script>alert(1)</script>\n```',
  ])('show %s as it was typed and let none of it through', (text) => {
    const html = markdownHtml(text);
    expect(html).not.toMatch(/<(script|img|svg|iframe|b)\b/);
    expect(html).toContain('&lt;');
  });
  it.each([
    'javascript:alert(1)',
    'JaVaScRiPt:alert(1)',
    'data:text/html,x',
    'vbscript:x',
    '//evil.example/x',
    'java\tscript:alert(1)',
  ])('make no link to %s', (address) => expect(markdownHtml(`[x](${address})`)).not.toContain('<a '));
  it('make no picture, which would be fetched from elsewhere', () => {
    expect(markdownHtml('![x](https://a.example/x.png)')).not.toContain('<img');
  });
  it('keep plain links, and say whose they are', () => {
    expect(markdownHtml('[doi](https://doi.org/10.1000/1)')).toContain(
      'href="https://doi.org/10.1000/1" rel="noopener',
    );
  });
});
