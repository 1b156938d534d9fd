import temml from 'temml';

/** MathML of LaTeX that the engine wrote, for pages that fetch it as data. */
export const formulaHtml = (latex: string, display = false): string =>
  temml.renderToString(latex, { displayMode: display, throwOnError: false, trust: false });
