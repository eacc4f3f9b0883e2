/**
 * A text cell that no spreadsheet runs as a formula: one that begins with =, +, -, @, a tab or a
 * line break gets an apostrophe in front, as OWASP recommends against CSV injection.
 */
export function neutraliseCell(text: string): string {
  return /^[=+\-@\t\r\n]/.test(text) ? `'${text}` : text
}
