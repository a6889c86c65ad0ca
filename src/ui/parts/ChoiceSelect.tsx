interface Props<Value extends string> {
  readonly label: string;
  readonly value: Value | undefined;
  /** A sentence about what the choice does. */
  readonly hint?: string;
  /** Text of the first entry, which leaves the choice to the program. */
  readonly otherwise: string;
  readonly options: readonly (readonly [Value, string])[];
  readonly choose: (value: Value | undefined, text: string) => void;
}

/** One choice out of a few, or none of one's own. */
export function ChoiceSelect<Value extends string>({ label, hint, value, otherwise, options, choose }: Props<Value>) {
  return (
    <label className="field">
      <span>{label}</span>
      <select
        value={value ?? ''}
        onChange={(event) => {
          const taken = options.find(([each]) => each === event.target.value);
          choose(taken?.[0], taken?.[1] ?? otherwise);
        }}
      >
        <option value="">{otherwise}</option>
        {options.map(([each, text]) => (
          <option key={each} value={each}>
            {text}
          </option>
        ))}
      </select>
      {hint && <span className="hint">{hint}</span>}
    </label>
  );
}
