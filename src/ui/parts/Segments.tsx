interface Props<Option extends string> {
  readonly label: string;
  readonly options: readonly Option[];
  readonly value: Option;
  readonly words: Record<Option, string>;
  readonly choose: (option: Option) => void;
}

/** A choice of a few words, all in sight. */
export function Segments<Option extends string>({ label, options, value, words, choose }: Props<Option>) {
  return (
    <fieldset className="segments">
      <legend className="unseen">{label}</legend>
      {options.map((option) => (
        <button key={option} type="button" aria-pressed={option === value} onClick={() => choose(option)}>
          {words[option]}
        </button>
      ))}
    </fieldset>
  );
}
