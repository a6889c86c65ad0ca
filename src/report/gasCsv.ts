import type { Estimate, Gas, WithErr } from '../plasma/index.ts';
import { significant } from './columns.ts';

const HEAD = ['section', 'item', 'zone', 'value', 'low', 'high', 'unit', 'features', 'note'] as const;
const DIGITS = 5;

interface Row {
  readonly section: string;
  readonly item: string;
  readonly zone?: string;
  readonly value?: number;
  readonly low?: number;
  readonly high?: number;
  readonly unit?: string;
  readonly features?: readonly number[];
  readonly note?: string;
}

/** All numbers about the gas as one CSV (RFC 4180): a row a number, `low` and `high` one sigma (a limit has one of them, two sigma), the note says what it assumes. */
export function gasCsv(gas: Gas): string {
  const rows = [
    ...reddeningRows(gas),
    ...zoneRows(gas),
    ...diagnosticRows(gas),
    ...abundanceRows(gas),
    ...ladderRows(gas),
    ...motionRows(gas),
  ];
  return `${[HEAD.join(','), ...rows.map((row) => HEAD.map((key) => cell(row[key])).join(','))].join('\r\n')}\r\n`;
}

function cell(value: Row[keyof Row]): string {
  if (value === undefined) return '';
  if (typeof value === 'number') return significant(value, DIGITS);
  const text = typeof value === 'string' ? value : value.join(' ');
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

const around = (quantity: WithErr | undefined) =>
  quantity ? { value: quantity.value, low: quantity.value - quantity.err, high: quantity.value + quantity.err } : {};

function ofEstimate(estimate: Estimate): Pick<Row, 'value' | 'low' | 'high'> {
  if (estimate.ended === 'value') return { value: estimate.value, low: estimate.low, high: estimate.high };
  if (estimate.ended === 'below') return { high: estimate.limit };
  return estimate.ended === 'above' ? { low: estimate.limit } : {};
}

const reason = (estimate: Estimate) => (estimate.ended === 'none' ? `${estimate.reason}. ` : '');

function reddeningRows({ reddening }: Gas): Row[] {
  const section = 'reddening';
  const note = reddening.assumption;
  return [
    { section, item: 'c(Hbeta)', ...around(reddening.cHbeta), note },
    { section, item: 'A(V)', ...around(reddening.aV), unit: 'mag', note },
    { section, item: 'E(B-V)', ...around(reddening.eBV), unit: 'mag', note },
    ...(reddening.helium
      ? [{ section, item: 'c(Hbeta) from He II', ...around(reddening.helium.cHbeta), note: reddening.helium.lines.join('; ') }]
      : []),
    ...reddening.lines.map((line) => ({
      section,
      item: `${line.label} observed`,
      ...around({ value: line.observed, err: line.observedErr }),
      unit: 'Hbeta = 100',
      features: line.features,
      note: `${line.state}${line.reason ? `: ${line.reason}` : ''}; case B ${significant(line.expected, DIGITS)}`,
    })),
  ];
}

const zoneRows = ({ zones }: Gas): Row[] =>
  zones.flatMap(({ zone, te, ne }) => [
    { section: 'zone', item: 'Te', zone, ...ofEstimate(te.estimate), unit: 'K', note: `${reason(te.estimate)}${te.from}` },
    { section: 'zone', item: 'ne', zone, ...ofEstimate(ne.estimate), unit: 'cm-3', note: `${reason(ne.estimate)}${ne.from}` },
  ]);

const diagnosticRows = ({ diagnostics, unused, jumps }: Gas): Row[] => [
  ...diagnostics.flatMap(({ label, zone, tells, ratio, result, features, assumption }) => [
    { section: 'diagnostic', item: `${label} ratio`, zone, ...around(ratio), features },
    {
      section: 'diagnostic',
      item: label,
      zone,
      ...ofEstimate(result),
      unit: tells === 'density' ? 'cm-3' : 'K',
      features,
      note: `${reason(result)}${assumption}`,
    },
  ]),
  ...jumps.map(({ label, result, assumption }) => ({
    section: 'diagnostic',
    item: label,
    ...ofEstimate(result),
    unit: 'K',
    note: `${reason(result)}${assumption}`,
  })),
  ...unused.map(({ label, reason: note }) => ({ section: 'diagnostic', item: label, note })),
];

const abundanceRows = ({ abundances, discrepancies }: Gas): Row[] => [
  ...abundances.map(({ ion, from, zone, abundance, low, high, lines, assumption }) => ({
    section: 'abundance',
    item: `N(${ion})/N(H II) ${from}`,
    zone,
    value: abundance,
    low,
    high,
    note: `${lines.join('; ')}. ${assumption}`,
  })),
  ...discrepancies.map(({ ion, factor, low, high }) => ({
    section: 'abundance',
    item: `${ion} recombination over collisional`,
    value: factor,
    low,
    high,
  })),
];

const ladderRows = ({ ladder }: Gas): Row[] => [
  ...(ladder.ceiling
    ? [
        {
          section: 'ladder',
          item: 'density ceiling',
          high: ladder.ceiling.densityCm3,
          unit: 'cm-3',
          note: `a tenth of ${ladder.ceiling.label} left`,
        },
      ]
    : []),
  ...ladder.rungs.flatMap(({ label, zone, nCrit, lifetimeS, halfAt, features, laboratory }) => [
    {
      section: 'ladder',
      item: `${label} critical density at ${ladder.te} K`,
      zone,
      value: nCrit,
      unit: 'cm-3',
      features,
      note: laboratory,
    },
    { section: 'ladder', item: `${label} half left at`, zone, value: halfAt, unit: 'cm-3', features },
    { section: 'ladder', item: `${label} lifetime`, zone, value: lifetimeS, unit: 's', features },
  ]),
  ...ladder.contradictions.map((note) => ({ section: 'ladder', item: 'contradiction', note })),
];

function motionRows({ kinematics }: Gas): Row[] {
  const section = 'kinematics';
  const trends = [
    ['velocity by ionisation energy', kinematics.velocityByEnergy, 'km/s/eV'],
    ['width by ionisation energy', kinematics.widthByEnergy, 'km/s/eV'],
    ['velocity by wavelength', kinematics.velocityByWavelength, 'km/s/Angstrom'],
    ['width by wavelength', kinematics.widthByWavelength, 'km/s/Angstrom'],
  ] as const;
  return [
    ...trends.flatMap(([item, trend, unit]) =>
      trend ? [{ section, item, ...around({ value: trend.slope, err: trend.slopeErr }), unit }] : [],
    ),
    ...kinematics.ions.flatMap(({ ion, velocityKms, velocityErrKms, fwhmKms, fwhmErrKms, count }) => [
      { section, item: `${ion} velocity`, ...around({ value: velocityKms, err: velocityErrKms }), unit: 'km/s', note: `${count} lines` },
      ...(fwhmKms === undefined
        ? []
        : [{ section, item: `${ion} FWHM`, ...around({ value: fwhmKms, err: fwhmErrKms ?? Number.NaN }), unit: 'km/s' }]),
    ]),
    ...kinematics.findings.map((note) => ({ section, item: 'finding', note })),
  ];
}
