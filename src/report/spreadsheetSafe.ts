/** A number as it is written in a cell. */
const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/**
 * Text that a spreadsheet would run as a formula, made harmless by a leading apostrophe: it begins with = @ + - (or a blank that spreadsheets skip before these)
 * and is no number.
 */
export const spreadsheetSafe = (text: string) => (/^\s*[=@+-]|^[\t\r]/.test(text) && !NUMBER.test(text) ? `'${text}` : text);
