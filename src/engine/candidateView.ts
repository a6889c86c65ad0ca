import type { Candidate } from '../identify/index.ts';
import { fromVacuum } from '../spectrum/index.ts';
import type { CandidateView, CompanionView, TransitionView } from './analysis.ts';
import { lineLabel } from './lineNames.ts';
import { transitionView, type ViewContext } from './transitionView.ts';

/** A view of candidates that makes each transition once. */
export function candidateViewer(context: ViewContext): (candidate: Candidate) => CandidateView {
  const made = new Map<number, TransitionView>();
  const transition = (line: number): TransitionView => {
    const known = made.get(line);
    if (known) return known;
    const fresh = transitionView(context, line);
    made.set(line, fresh);
    return fresh;
  };
  return (candidate) => {
    const transitions = candidate.lines.map(transition);
    return {
      label: candidate.lines.map((line) => lineLabel(context.data, line, context.medium)).join(' + '),
      keys: transitions.map((t) => t.key),
      transitions,
      shares: candidate.shares,
      probability: candidate.probability,
      velocityKms: candidate.velocityKms,
      velocityErrKms: candidate.velocityErrKms,
      evidence: candidate.evidence,
      companions: candidate.companions.map(
        (found): CompanionView => ({
          label: lineLabel(context.data, found.line, context.medium),
          expectedAt: fromVacuum(found.expectedAt, context.medium),
          predictedFlux: found.predictedFlux,
          outcome: found.outcome,
          ...(found.feature === undefined ? {} : { feature: found.feature }),
        }),
      ),
    };
  };
}
