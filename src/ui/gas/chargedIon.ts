const VALUES: Record<string, number> = { I: 1, V: 5, X: 10 };

/** An ion by its charge, as abundances name it: `O III` -> `O²⁺`, `H II` -> `H⁺`, `N I` -> `N⁰`. */
export function chargedIon(ion: string): string {
  const [element, roman = ''] = ion.split(' ');
  const digits = [...roman].map((letter) => VALUES[letter] ?? 0);
  const stage = digits.reduce((sum, value, k) => sum + (value < (digits[k + 1] ?? 0) ? -value : value), 0);
  const charge = stage - 1;
  if (charge <= 0) return `${element}⁰`;
  return `${element}${charge === 1 ? '' : [...String(charge)].map((digit) => '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(digit)]).join('')}⁺`;
}
