import type { AtomicData } from '../atomic/index.ts';
import type { Claim } from './claims.ts';
import type { LineFacts } from './lineFacts.ts';
import type { SystemModel } from './model.ts';
import type { NamingSettings } from './naming.ts';
import type { Rule } from './rules.ts';
import type { FamilyScale, ScalePosterior, ScalePrior } from './scalePosterior.ts';
import type { Sightings } from './sightings.ts';
import type { Survey } from './survey.ts';

/** What the rest of the spectrum says. */
export interface WeighContext {
  readonly data: AtomicData;
  readonly facts: LineFacts;
  readonly settings: NamingSettings;
  readonly survey: Survey;
  readonly model: SystemModel;
  readonly sightings: Sightings;
  readonly posteriors: readonly ScalePosterior[];
  readonly priors: readonly ScalePrior[];
  readonly scales: readonly FamilyScale[];
  readonly claims: ReadonlyMap<number, Claim>;
  readonly rule: Rule;
}
