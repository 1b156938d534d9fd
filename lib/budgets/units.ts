/** Quantities as people write and read them. SI base units inside, prefixes at the edge. */

const BYTES = ['B', 'kB', 'MB', 'GB', 'TB', 'PB', 'EB'] as const;
const COUNT = ['', 'k', 'M', 'G', 'T', 'P'] as const;

function scaled(value: number, names: readonly string[], figures: number): string {
  let size = value;
  let k = 0;
  while (Math.abs(size) >= 999.5 && k < names.length - 1) {
    size /= 1000;
    k++;
  }
  return `${figure(size, figures)}${names[k] ? ` ${names[k]}` : ''}`;
}

const figure = (value: number, figures: number) => {
  const text = Number(value.toPrecision(figures));
  return Math.abs(text) >= 1e6 || (text !== 0 && Math.abs(text) < 1e-3)
    ? value.toExponential(figures - 1).replace('-', '−')
    : String(text).replace('-', '−');
};

/** Decimal bytes: 3.58 GB. */
export const bytesText = (bytes: number) => scaled(bytes, BYTES, 3);
/** 149 M, 2.39 G. */
export const countText = (count: number) =>
  count < 1e5 ? Math.ceil(count).toLocaleString('en').replace(/,/g, ' ') : scaled(count, COUNT, 4);

/** 52 min, 6.9 h, 2.3 days. */
export function durationText(seconds: number): string {
  if (!Number.isFinite(seconds)) return 'never';
  if (seconds < 1e-6) return `${figure(seconds * 1e9, 3)} ns`;
  if (seconds < 1e-3) return `${figure(seconds * 1e6, 3)} µs`;
  if (seconds < 1) return `${figure(seconds * 1e3, 3)} ms`;
  if (seconds < 90) return `${figure(seconds, 2)} s`;
  if (seconds < 90 * 60) return `${figure(seconds / 60, 2)} min`;
  if (seconds < 36 * 3600) return `${figure(seconds / 3600, 2)} h`;
  if (seconds < 730 * 86400) return `${figure(seconds / 86400, 2)} days`;
  return `${figure(seconds / (365.25 * 86400), 3)} years`;
}

/** 22.0 cm, 1.2 km. */
export function lengthText(metres: number): string {
  const size = Math.abs(metres);
  if (size === 0) return '0 m';
  if (size >= 1000) return `${figure(metres / 1000, 3)} km`;
  if (size >= 1) return `${figure(metres, 3)} m`;
  if (size >= 0.01) return `${figure(metres * 100, 3)} cm`;
  if (size >= 1e-3) return `${figure(metres * 1000, 3)} mm`;
  return `${figure(metres * 1e6, 3)} µm`;
}
