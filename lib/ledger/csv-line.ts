/**
 * One line of CSV (RFC 4180), its line end included. A cell that a spreadsheet would take for a formula gets an
 * apostrophe before it, which spreadsheets show as text.
 * @see OWASP, "CSV Injection"
 */
export function csvLine(cells: readonly string[]): string {
  return `${cells.map(csvCell).join(',')}\r\n`;
}

const csvCell = (text: string): string => {
  const harmless = /^[=+\-@\t\r]/.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(harmless) ? `"${harmless.replaceAll('"', '""')}"` : harmless;
};
