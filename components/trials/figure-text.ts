const RAISED: Readonly<Record<string, string>> = {
  '-': '⁻',
  '0': '⁰',
  '1': '¹',
  '2': '²',
  '3': '³',
  '4': '⁴',
  '5': '⁵',
  '6': '⁶',
  '7': '⁷',
  '8': '⁸',
  '9': '⁹',
};

/** Figures as the book sets them: "1.1e-16" → "1.1 × 10⁻¹⁶", ">= 1.9" → "≥ 1.9". */
export const figureText = (text: string) =>
  text
    .replace(/(\d(?:\.\d+)?)e([+-]?)0*(\d+)/gi, (_, mantissa: string, sign: string, digits: string) => {
      const exponent = `${sign === '-' ? '-' : ''}${digits}`;
      return `${mantissa} × 10${[...exponent].map((digit) => RAISED[digit] ?? digit).join('')}`;
    })
    .replace(/>=/g, '≥')
    .replace(/<=/g, '≤')
    .replace(/\+-|\+\/-/g, '±')
    .replace(/(^|[\s(≤≥=,])-(?=\d)/g, '$1−');
