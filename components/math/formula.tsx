import temml from 'temml';

/**
 * An equation as MathML, set on the server.
 * @param latex   LaTeX source made by the engine's own texts, never a user's
 * @param display true for an equation on a line of its own
 */
export function Formula({ latex, display = false }: { latex: string; display?: boolean }) {
  const html = temml.renderToString(latex, { displayMode: display, throwOnError: false, trust: false });
  return <span className="formula" dangerouslySetInnerHTML={{ __html: html }} />;
}
