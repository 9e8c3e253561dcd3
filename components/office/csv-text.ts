/**
 * One table as CSV (RFC 4180: CRLF, quotes doubled). A cell that a spreadsheet would run as a formula is given an
 * apostrophe in front, which spreadsheets hide; figures that are plain numbers stay numbers.
 */
export function csvText(rows: readonly (readonly string[])[]): string {
  return rows.map((row) => row.map(cell).join(',')).join('\r\n') + '\r\n';
}

const isNumber = (text: string): boolean => /^-?\d+(\.\d+)?$/.test(text);

function cell(text: string): string {
  const safe = /^[=+\-@\t\r]/.test(text) && !isNumber(text) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}
