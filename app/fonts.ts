import localFont from 'next/font/local';

// No metric-adjusted stand-ins: they are made from Arial, which has Greek letters and would catch λ before STIX does.

const archivo = localFont({
  src: [
    {
      path: '../node_modules/@fontsource-variable/archivo/files/archivo-latin-standard-normal.woff2',
      style: 'normal',
      weight: '100 900',
    },
    {
      path: '../node_modules/@fontsource-variable/archivo/files/archivo-latin-standard-italic.woff2',
      style: 'italic',
      weight: '100 900',
    },
  ],
  variable: '--font-archivo',
  declarations: [{ prop: 'font-stretch', value: '62% 125%' }],
  adjustFontFallback: false,
});

const besley = localFont({
  src: '../node_modules/@fontsource-variable/besley/files/besley-latin-wght-normal.woff2',
  weight: '400 900',
  variable: '--font-besley',
  adjustFontFallback: false,
});

const spline = localFont({
  src: [
    {
      path: '../node_modules/@fontsource-variable/spline-sans-mono/files/spline-sans-mono-latin-wght-normal.woff2',
      style: 'normal',
      weight: '300 700',
    },
    {
      path: '../node_modules/@fontsource-variable/spline-sans-mono/files/spline-sans-mono-latin-wght-italic.woff2',
      style: 'italic',
      weight: '300 700',
    },
  ],
  variable: '--font-spline',
  preload: false,
  adjustFontFallback: false,
});

const stixText = localFont({
  src: [
    {
      path: '../node_modules/@fontsource-variable/stix-two-text/files/stix-two-text-latin-wght-normal.woff2',
      style: 'normal',
      weight: '400 700',
    },
    {
      path: '../node_modules/@fontsource-variable/stix-two-text/files/stix-two-text-latin-wght-italic.woff2',
      style: 'italic',
      weight: '400 700',
    },
  ],
  variable: '--font-stix-text',
  preload: false,
  adjustFontFallback: false,
});

const stixGreek = localFont({
  src: [
    {
      path: '../node_modules/@fontsource-variable/stix-two-text/files/stix-two-text-greek-wght-normal.woff2',
      style: 'normal',
      weight: '400 700',
    },
    {
      path: '../node_modules/@fontsource-variable/stix-two-text/files/stix-two-text-greek-wght-italic.woff2',
      style: 'italic',
      weight: '400 700',
    },
  ],
  variable: '--font-stix-greek',
  declarations: [{ prop: 'unicode-range', value: 'U+370-3FF' }],
  preload: false,
  adjustFontFallback: false,
});

const stixMath = localFont({
  src: '../node_modules/@fontsource/stix-two-math/files/stix-two-math-latin-400-normal.woff2',
  weight: '400',
  variable: '--font-stix-math',
  preload: false,
  adjustFontFallback: false,
});

/** Class names that define the family variables of app/styles/tokens.css. */
export const fontVariables = [archivo, besley, spline, stixText, stixGreek, stixMath]
  .map((font) => font.variable)
  .join(' ');
