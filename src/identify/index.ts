// Features -> names: redshift, candidates, joint inference over the whole spectrum (expectation-maximisation, Dempster et al. 1977), itemised evidence.
// Deliberately not here: measuring, and the user's decision. A name is a proposal with a probability.
export { type NamingControl, nameMarks } from './nameMarks.ts';
export {
  type Candidate,
  type CompanionFinding,
  DEFAULT_NAMING_SETTINGS,
  type Evidence,
  type FeatureNaming,
  type FixedName,
  type Mark,
  type Naming,
  type NamingSettings,
  type ObjectKind,
  type RedshiftHypothesis,
} from './naming.ts';
export { prepareNaming } from './prepareNaming.ts';
