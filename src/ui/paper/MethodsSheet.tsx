import { useEffect, useState } from 'react';
import { type MethodFacts, methodsText } from '../../report/index.ts';
import { useDesk } from '../desk/deskStore.ts';
import { words } from '../words.ts';
import { referencesOf } from './paperMaterial.ts';
import { setPaper } from './setPaper.ts';

const { paper: label } = words;
/** A part that scrolls is reached by keyboard. */
const SCROLLS = { tabIndex: 0 } as const;

/** The methods paragraph, to be edited, and the works it and the names rest on. */
export function MethodsSheet({ methods }: { readonly methods: MethodFacts }) {
  const edited = useDesk((state) => state.history.document.settings.paper?.methods);
  const generated = methodsText(methods);
  const [bib, setBib] = useState('');
  useEffect(() => {
    let gone = false;
    void referencesOf(methods).then((text) => gone || setBib(text));
    return () => {
      gone = true;
    };
  }, [methods]);
  return (
    <div className="methods">
      <Paragraph key={edited ?? generated} text={edited ?? generated} generated={generated} />
      <p className="hint">{edited === undefined ? label.methodsHint : label.methodsEdited}</p>
      {edited !== undefined && (
        <button type="button" className="small" onClick={() => setPaper({ methods: undefined }, label.methodsBack)}>
          {label.methodsAgain}
        </button>
      )}
      <h3>{label.references}</h3>
      <pre className="bib" {...SCROLLS}>
        {bib}
      </pre>
    </div>
  );
}

function Paragraph({ text, generated }: { readonly text: string; readonly generated: string }) {
  const [now, setNow] = useState(text);
  return (
    <label className="field">
      <span>{label.methods}</span>
      <textarea
        rows={12}
        value={now}
        onChange={(event) => setNow(event.target.value)}
        onBlur={() => now !== text && setPaper({ methods: now === generated ? undefined : now }, label.methodsChanged)}
      />
    </label>
  );
}
