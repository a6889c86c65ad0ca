import { useId, useState } from 'react';

interface Props {
  readonly label: string;
  readonly value: string;
  readonly placeholder?: string;
  readonly unit?: string;
  readonly hint?: string;
  /** Words when the text cannot be taken; undefined when it can. */
  readonly fault?: (text: string) => string | undefined;
  readonly commit: (text: string) => void;
}

/** A field that is taken over on Enter or when it is left, and says why when it cannot be. */
export function TextSetting({ label, value, placeholder, unit, hint, fault, commit }: Props) {
  const [text, setText] = useState(value);
  const [wrong, setWrong] = useState<string>();
  const id = useId();
  const take = () => {
    const trimmed = text.trim();
    if (trimmed === value) return setWrong(undefined);
    const found = fault?.(trimmed);
    setWrong(found);
    if (!found) commit(trimmed);
  };
  return (
    <div className="field">
      <label htmlFor={id}>{label}</label>
      <span className="with-unit">
        <input
          id={id}
          type="text"
          inputMode={fault ? 'decimal' : 'text'}
          value={text}
          placeholder={placeholder}
          aria-invalid={wrong !== undefined}
          aria-describedby={hint || wrong ? `${id}-hint` : undefined}
          onChange={(event) => setText(event.target.value)}
          onBlur={take}
          onKeyDown={(event) => event.key === 'Enter' && take()}
        />
        {unit && <span className="unit">{unit}</span>}
      </span>
      {(hint || wrong) && (
        <p id={`${id}-hint`} className={wrong ? 'hint fault' : 'hint'}>
          {wrong ?? hint}
        </p>
      )}
    </div>
  );
}
