import type { SessionDocument, Settings, Shelved, Source, Verdict } from './document.ts';

/** One reversible step: what stood there before and after. A verdict is found by its place `at`. */
export type Step =
  | { readonly on: 'verdict'; readonly before?: Verdict; readonly after?: Verdict }
  | { readonly on: 'settings'; readonly before: Settings; readonly after: Settings }
  | { readonly on: 'source'; readonly before?: Source; readonly after?: Source }
  | { readonly on: 'shelf'; readonly before?: readonly Shelved[]; readonly after?: readonly Shelved[] };

/** A described change of the document: a sentence for the history and the steps that make it. Plain data. */
export interface Change {
  /** Past tense, without full stop: "accepted [O III] 5006.84 for feature 41". */
  readonly sentence: string;
  readonly steps: readonly Step[];
}

/** The document after `change`. */
export function applyChange(document: SessionDocument, change: Change): SessionDocument {
  return change.steps.reduce(applyStep, document);
}

/** The change that takes `change` back: the same steps backwards, before and after exchanged. */
export function inverseOf(change: Change): Change {
  const steps = change.steps.map((step): Step => ({ ...step, before: step.after, after: step.before }) as Step).reverse();
  return { sentence: `took back: ${change.sentence}`, steps };
}

function applyStep(document: SessionDocument, step: Step): SessionDocument {
  switch (step.on) {
    case 'settings':
      return { ...document, settings: step.after };
    case 'source':
      return { ...document, source: step.after };
    case 'shelf': {
      const { shelf: _, ...rest } = document;
      return step.after ? { ...rest, shelf: step.after } : rest;
    }
    case 'verdict': {
      const place = step.before?.at ?? step.after?.at;
      const others = document.verdicts.filter((v) => v.at !== place);
      const verdicts = step.after ? [...others, step.after].sort((a, b) => a.at - b.at) : others;
      return { ...document, verdicts };
    }
  }
}
