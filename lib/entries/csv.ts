/** Comma-separated values (RFC 4180): fields may stand in quotes, lines end in LF or CRLF, a byte order mark is passed over. */

export interface CsvRow {
  /** 1-based line of the file on which the row begins. */
  readonly line: number;
  readonly fields: string[];
}

/** Rows that are not blank; fields are trimmed. An open quote runs to the end of the text. */
export function csvRows(text: string): CsvRow[] {
  const rows: CsvRow[] = [];
  let line = 1;
  let begun = 1;
  let fields: string[] = [];
  let field = '';
  let quoted = false;
  const endField = () => {
    fields.push(field.trim());
    field = '';
  };
  const endRow = () => {
    endField();
    if (fields.some((one) => one !== '')) rows.push({ line: begun, fields });
    fields = [];
  };
  const source = text.replace(/^\uFEFF/, '');
  for (let k = 0; k < source.length; k++) {
    const sign = source[k]!;
    if (quoted) {
      if (sign === '"' && source[k + 1] === '"') field += source[++k]!;
      else if (sign === '"') quoted = false;
      else field += sign;
      if (sign === '\n') line++;
    } else if (sign === '"' && field.trim() === '') {
      field = '';
      quoted = true;
    } else if (sign === ',') endField();
    else if (sign === '\n') {
      endRow();
      begun = ++line;
    } else if (sign !== '\r') field += sign;
  }
  endRow();
  return rows;
}

const quotedField = (field: string) => (/[",\n\r]/.test(field) ? `"${field.replaceAll('"', '""')}"` : field);

export const csvText = (rows: readonly (readonly string[])[]) =>
  rows.map((row) => `${row.map(quotedField).join(',')}\n`).join('');
