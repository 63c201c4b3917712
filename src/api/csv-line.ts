/** A line of an RFC 4180 file, ended by CR LF. A cell that a spreadsheet would run as a formula is led by an
 *  apostrophe. */
export const csvLine = (cells: readonly string[]): string => `${cells.map(csvCell).join(',')}\r\n`;

function csvCell(text: string): string {
  const safe = /^[=+\-@\t\r]/.test(text) && Number.isNaN(Number(text)) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}
