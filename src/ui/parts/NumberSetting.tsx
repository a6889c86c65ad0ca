import { words } from '../words.ts';
import { TextSetting } from './TextSetting.tsx';

interface Props {
  readonly label: string;
  readonly unit: string;
  readonly hint?: string;
  readonly low: number;
  readonly high: number;
  /** What the user chose; absent = left to the program. */
  readonly value: number | undefined;
  /** What is used. */
  readonly used: number | undefined;
  readonly commit: (value: number | undefined, sentence: string) => void;
}

const { settings: said } = words;

/** A number with its limits; emptied, it is left to the program again. */
export function NumberSetting({ label, unit, hint, low, high, value, used, commit }: Props) {
  const fault = (text: string) => {
    if (text === '') return undefined;
    const n = numberIn(text);
    return n >= low && n <= high ? undefined : said.notNumber(low, high);
  };
  const take = (text: string) => {
    if (text === '') commit(undefined, said.cleared(label));
    else commit(numberIn(text), said.changed(label, `${text} ${unit}`));
  };
  return (
    <TextSetting
      key={`${value}`}
      label={label}
      unit={unit}
      hint={hint}
      value={value === undefined ? '' : String(value)}
      placeholder={used === undefined ? '' : String(used)}
      fault={fault}
      commit={take}
    />
  );
}

const numberIn = (text: string) => Number(text.replace('−', '-').replace(',', '.'));
