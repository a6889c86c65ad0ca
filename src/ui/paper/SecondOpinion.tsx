import { useState } from 'react';
import type { FeatureView } from '../../engine/index.ts';
import { ProblemError, wordProblem } from '../../problems/index.ts';
import { compareSessions, readSession, type SessionDocument } from '../../session/index.ts';
import { raiseAlert, useDesk } from '../desk/deskStore.ts';
import { fixed } from '../figures.ts';
import { words } from '../words.ts';
import { AnsweredProblem } from '../workerClient.ts';
import { weighFreely } from './weighFreely.ts';

const { opinion: label } = words.paper;

/** The other opinion, and the probabilities of all names as no verdict has touched them. */
interface Other {
  readonly name: string;
  readonly document: SessionDocument;
  readonly weighed: readonly FeatureView[];
}

/** Another session on the same spectrum beside this one: where they differ, and why. */
export function SecondOpinion() {
  const document = useDesk((state) => state.history.document);
  const [other, setOther] = useState<Other>();
  const found = other && compareSessions(document, other.document, other.weighed);
  const take = async (file: File | undefined) => {
    if (!file) return;
    try {
      const opened = { name: file.name, document: readSession(await file.text(), file.name).document };
      setOther({ ...opened, weighed: [] });
      const { source, settings } = document;
      if (source) setOther({ ...opened, weighed: await weighFreely(source, settings) });
    } catch (error) {
      if (!(error instanceof ProblemError || error instanceof AnsweredProblem)) throw error;
      raiseAlert(wordProblem(error.problem));
    }
  };
  return (
    <div className="opinion">
      <p>{label.hint}</p>
      <label className="field">
        <span>{label.choose}</span>
        <input type="file" accept=".json" onChange={(event) => void take(event.target.files?.[0])} />
      </label>
      <div aria-live="polite">
        {other && found && (
          <>
            {!found.sameSource && <p className="doubt">{label.otherSource(other.name)}</p>}
            <p>{label.summary(found.agreeing, found.verdicts.length)}</p>
            {found.verdicts.length > 0 && (
              <ul className="differences">
                {found.verdicts.map((each) => (
                  <li key={`${each.kind} ${each.at}`}>
                    <span className="number">{`${fixed(each.at, 2)} Å`}</span> {each.sentence}
                  </li>
                ))}
              </ul>
            )}
            {found.settings.length > 0 && (
              <>
                <h3>{label.settings}</h3>
                <ul className="differences">
                  {found.settings.map(({ key, first, second }) => (
                    <li key={key}>{label.setting(key, first, second)}</li>
                  ))}
                </ul>
              </>
            )}
          </>
        )}
      </div>
    </div>
  );
}
