import { useEffect, useState } from 'react';
import type { LineRecord, LineSearchResult } from '../../engine/index.ts';
import { Cancelled } from '../workerClient.ts';
import { useDesk } from './deskStore.ts';
import { listClient, tell } from './engineRuns.ts';

/** What the list answers to a query; the last answer stays until the next one is there. */
export function useLineSearch(query: string): LineSearchResult | undefined {
  const [result, setResult] = useState<LineSearchResult>();
  const own = useDesk((state) => state.history.document.settings.ownLines);
  useEffect(() => ask(() => listClient().searchLines(query, own), setResult), [query, own]);
  return result;
}

/** All the list holds of a line, `te` in K, `ne` in cm^-3. */
export function useLineRecord(line: number | undefined, te: number, ne: number): LineRecord | undefined {
  const [record, setRecord] = useState<LineRecord>();
  const own = useDesk((state) => state.history.document.settings.ownLines);
  useEffect(() => {
    setRecord(undefined);
    return line === undefined ? undefined : ask(() => listClient().lineRecord(line, te, ne, own), setRecord);
  }, [line, te, ne, own]);
  return record;
}

/** Runs a question; its answer is dropped when the asker has gone on to another one. */
function ask<T>(question: () => Promise<T>, take: (answer: T) => void): () => void {
  let current = true;
  question().then(
    (answer) => {
      if (current) take(answer);
    },
    (error: unknown) => {
      if (current && !(error instanceof Cancelled)) tell(error);
    },
  );
  return () => {
    current = false;
  };
}
