/** Name and version, as every file that is written says them; tests/house holds it to package.json. */
export const PROGRAM = 'Linewright 0.1.0';
