/** A ratio of lines of one ion that tells temperature or density. */
export interface Diagnostic {
  /** As the trade writes it. */
  readonly label: string;
  readonly ion: string;
  readonly tells: 'temperature' | 'density';
  /** Lines of numerator and denominator, vacuum Angstrom: each side is the sum of those that were measured. */
  readonly over: readonly number[];
  readonly under: readonly number[];
  /** What else moves it, or what it assumes; a sentence. */
  readonly caution?: string;
  /** Only taken for its zone when nothing better is there: what else feeds its lines, or it depends on both temperature and density. */
  readonly secondary?: boolean;
}

const density = (label: string, ion: string, over: number, under: number, more: Partial<Diagnostic> = {}): Diagnostic => ({
  label,
  ion,
  tells: 'density',
  over: [over],
  under: [under],
  ...more,
});
const temperature = (
  label: string,
  ion: string,
  over: readonly number[],
  under: readonly number[],
  more: Partial<Diagnostic> = {},
): Diagnostic => ({ label, ion, tells: 'temperature', over, under, ...more });

const RECOMBINES = 'Recombination also feeds the numerator; that part is not taken off.';

/**
 * The ratios looked for: a row a ratio. Which ones are in use: Osterbrock & Ferland 2006, chapter 5; the others are common practice, no source.
 * Wavelengths only point at level pairs of the atoms; the nearest pair is taken.
 */
export const DIAGNOSTICS: readonly Diagnostic[] = [
  density('[S II] 6716/6731', 'S II', 6718.29, 6732.67),
  density('[O II] 3729/3726', 'O II', 3729.88, 3727.09),
  density('[N I] 5198/5200', 'N I', 5199.35, 5201.7, { caution: 'Starlight can feed these lines as well as collisions.' }),
  density('[Cl III] 5518/5538', 'Cl III', 5519.25, 5539.43),
  density('[Ar IV] 4711/4740', 'Ar IV', 4712.69, 4741.49, { caution: 'He I 4713 must be told apart from 4711.' }),
  density('[K V] 4123/4163', 'K V', 4123.7, 4164.7),
  density('[Fe III] 4702/4658', 'Fe III', 4702.85, 4659.35),
  density('[Fe III] 4881/4658', 'Fe III', 4882.36, 4659.35),
  density('[Fe II] 1.533/1.644 μm', 'Fe II', 15338.9, 16440),
  density('C III] 1907/1909', 'C III', 1906.68, 1908.73),
  density('Si III] 1883/1892', 'Si III', 1882.71, 1892.03),
  density('N IV] 1483/1487', 'N IV', 1483.32, 1486.5),
  density('[Ne IV] 2422/2424', 'Ne IV', 2422.36, 2425),
  density('[S III] 19/33 μm', 'S III', 187130, 334810),
  temperature('[O III] 4363/(4959+5007)', 'O III', [4364.44], [4960.29, 5008.24]),
  temperature('[N II] 5755/(6548+6583)', 'N II', [5756.2], [6549.86, 6585.27], { caution: RECOMBINES }),
  temperature('[S III] 6312/(9069+9531)', 'S III', [6313.8], [9071.1, 9533.2], {
    caution: 'Telluric absorption can weaken 9069 and 9531.',
  }),
  temperature('[Ar III] 5192/(7136+7751)', 'Ar III', [5193.26], [7137.76, 7753.23]),
  temperature('[Ne III] 3342/(3869+3968)', 'Ne III', [3343.14], [3869.86, 3968.59]),
  temperature('[O I] 5577/(6300+6363)', 'O I', [5578.89], [6302.05, 6365.54], { caution: 'Night sky must be taken off 5577 well.' }),
  temperature('[O II] (7320+7330)/(3726+3729)', 'O II', [7320.94, 7322.01, 7331.69, 7332.75], [3727.09, 3729.88], {
    secondary: true,
    caution: `Depends on density too, and leans on the reddening law over a long stretch. ${RECOMBINES}`,
  }),
  temperature('[S II] (4069+4076)/(6716+6731)', 'S II', [4069.75, 4077.5], [6718.29, 6732.67], {
    secondary: true,
    caution: 'Depends on density too, and leans on the reddening law over a long stretch.',
  }),
  temperature('[N I] 3466/(5198+5200)', 'N I', [3467.49, 3467.54], [5199.35, 5201.7], { secondary: true }),
  temperature('[C I] 8727/(9824+9850)', 'C I', [8729.53], [9826.82, 9852.96], { secondary: true, caution: RECOMBINES }),
  temperature('[Cl III] 3343/(5518+5538)', 'Cl III', [3354.2, 3343.8], [5519.25, 5539.43], { secondary: true }),
  temperature('[Cl IV] 5323/(7531+8046)', 'Cl IV', [5324.76], [7532.9, 8047.9]),
  temperature('[Ar IV] (7171+7263)/(4711+4740)', 'Ar IV', [7172.5, 7239.5, 7264.7, 7333.4], [4712.69, 4741.49], { secondary: true }),
  temperature('[Ar V] 4626/(6435+7006)', 'Ar V', [4626.2], [6436.9, 7007.3]),
  temperature('[Ne IV] (4714+4725)/(2422+2424)', 'Ne IV', [4715.57, 4717.02, 4725.47, 4726.95], [2422.36, 2425], { secondary: true }),
  temperature('[Ne V] 2975/(3346+3426)', 'Ne V', [2976], [3346.8, 3426.9]),
];
