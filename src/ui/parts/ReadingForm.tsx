import type { ReadingView } from '../../engine/index.ts';
import type { ReadingChoices } from '../../readers/index.ts';
import { chooseReading } from '../desk/readingChoices.ts';
import { words } from '../words.ts';
import { ChoiceSelect } from './ChoiceSelect.tsx';
import { TextSetting } from './TextSetting.tsx';

const { reading: label } = words;
const UNITS = ['Angstrom', 'nm', 'um', 'mm', 'cm', 'm', 'Hz', 'GHz', 'THz', 'eV', 'keV', 'cm-1', 'log10 Angstrom'] as const;
const COLUMNS = ['wavelengthColumn', 'fluxColumn', 'errorColumn', 'maskColumn'] as const;
const entries = <Key extends string>(texts: Readonly<Record<Key, string>>) => Object.entries(texts) as [Key, string][];
const numberFault = (text: string) => (text === '' || Number.isFinite(Number(text)) ? undefined : label.notNumber);

/** Every choice about how the file is read; each is a change that can be undone. */
export function ReadingForm({ reading, choices }: { reading: ReadingView; choices: ReadingChoices }) {
  const take = (change: ReadingChoices, what: string) => chooseReading({ ...choices, ...change }, label.changed(what));
  const number = (text: string) => (text === '' ? undefined : Number(text));
  return (
    <>
      <ChoiceSelect
        label={label.medium}
        hint={label.mediumHint}
        value={choices.medium}
        otherwise={`${label.asFound} (${words.medium[reading.medium]})`}
        options={[
          ['air', words.medium.air],
          ['vacuum', words.medium.vacuum],
        ]}
        choose={(medium, text) => take({ medium }, text)}
      />
      <ChoiceSelect
        label={label.unit}
        hint={label.unitHint}
        value={choices.wavelengthUnit}
        otherwise={label.asFound}
        options={UNITS.map((unit) => [unit, unit] as const)}
        choose={(wavelengthUnit, text) => take({ wavelengthUnit }, text)}
      />
      {COLUMNS.map((column) => (
        <ColumnChoice key={column} column={column} reading={reading} chosen={choices[column]} take={take} />
      ))}
      <ChoiceSelect
        label={label.errorMeaning}
        hint={label.errorMeaningHint}
        value={choices.errorMeaning}
        otherwise={label.asFound}
        options={entries(label.errorMeanings)}
        choose={(errorMeaning, text) => take({ errorMeaning }, text)}
      />
      <ChoiceSelect
        label={label.maskMeaning}
        hint={label.maskMeaningHint}
        value={choices.maskMeaning}
        otherwise={label.asFound}
        options={entries(label.maskMeanings)}
        choose={(maskMeaning, text) => take({ maskMeaning }, text)}
      />
      <TextSetting
        key={`missing ${choices.missingValue ?? ''}`}
        label={label.missingValue}
        value={choices.missingValue?.toString() ?? ''}
        hint={label.missingValueHint}
        fault={numberFault}
        commit={(text) => take({ missingValue: number(text) }, `${label.missingValue} ${text}`)}
      />
      <TextSetting
        key={`velocity ${choices.velocityCorrectionKms ?? ''}`}
        label={label.velocity}
        unit="km/s"
        value={choices.velocityCorrectionKms?.toString() ?? ''}
        hint={label.velocityHint}
        fault={numberFault}
        commit={(text) => take({ velocityCorrectionKms: number(text) }, `${label.velocity} ${text} km/s`)}
      />
    </>
  );
}

interface ColumnProps {
  readonly column: (typeof COLUMNS)[number];
  readonly reading: ReadingView;
  readonly chosen: string | undefined;
  readonly take: (change: ReadingChoices, what: string) => void;
}

/** A column chosen from those the file has, each with its unit and what it was taken for. */
function ColumnChoice({ column, reading, chosen, take }: ColumnProps) {
  if (!reading.columns) {
    return (
      <TextSetting
        key={`${column} ${chosen ?? ''}`}
        label={label[column]}
        value={chosen ?? ''}
        placeholder={reading.choices[column] ?? label.asFound}
        hint={`${label.columnHints[column]} ${label.columnHint}`}
        commit={(text) => take({ [column]: text || undefined }, `${label[column].toLowerCase()} ${text || label.asFound}`)}
      />
    );
  }
  const options = reading.columns.map(
    ({ name, unit, role }) => [name, [name, unit && `[${unit}]`, role && `– ${role}`].filter(Boolean).join(' ')] as const,
  );
  const withNone = column === 'errorColumn' || column === 'maskColumn' ? [...options, ['none', label.none] as const] : options;
  return (
    <ChoiceSelect
      label={label[column]}
      hint={label.columnHints[column]}
      value={chosen}
      otherwise={reading.choices[column] ? `${label.asFound} (${reading.choices[column]})` : label.asFound}
      options={withNone}
      choose={(name, text) => take({ [column]: name }, `${label[column].toLowerCase()} ${text}`)}
    />
  );
}
