export type { NeighbourOptions, NeighbourTest, ZoneForTest } from './adjacent-zones.js';
export { equalOverlap, rankTest, smallestRankP, TOUCHING_OVERLAP, testNeighbours } from './adjacent-zones.js';
export type { VoteOptions, VotingClock } from './amino-acid-votes.js';
export { aminoAcidVotes } from './amino-acid-votes.js';
export type { Assignment, ZonePriors } from './assignment.js';
export { assignZone, STRADDLE, zoneAssigner } from './assignment.js';
export type { BedNotes, BedRowInput } from './bed-rows.js';
export { bedRows } from './bed-rows.js';
export { bootstrapP } from './bootstrap-rounds.js';
export type { Criteria } from './choice-sentence.js';
export { choiceSentence } from './choice-sentence.js';
export { type ChoiceArgument, choiceTask, chooseModelApart } from './choice-task.js';
export type { Comparison } from './compare-models.js';
export type { Continuum } from './continuum.js';
export { fitContinuum } from './continuum.js';
export type { Gap, GapOptions } from './gap-statistic.js';
export { gapFromReferences, gapOf, gapReferences, gapStatistic, gapTasks, groupsByGap } from './gap-statistic.js';
export { goldenSection } from './golden-section.js';
export type { KMeansCheck, KMeansCheckInput } from './kmeans-check.js';
export { kmeansCheck } from './kmeans-check.js';
export type { LeadArgument } from './lead-of-zones.js';
export { bootstrapLead, leadOfZones } from './lead-of-zones.js';
export type { LikelihoodRatioArgument, NullModel } from './likelihood-ratio.js';
export { bootstrapLikelihoodRatio } from './likelihood-ratio.js';
export type { Mixture, MixtureOptions } from './mixture.js';
export { bic, fitMixture } from './mixture.js';
export type { ModelChoice } from './model-choice.js';
export { chooseModel, FEWEST_BEDS, MOST_ZONES } from './model-choice.js';
export { equilibriumLimit, isNearEquilibrium, nearEquilibriumRatio } from './near-equilibrium.js';
export { partition, partitionCosts } from './partition.js';
export type { SettledChoice, SettleOptions } from './settle-choice.js';
export { CLEAR_BIC, NEAR_BIC, STRICTER, settleChoice } from './settle-choice.js';
export type { ShellNotes } from './shell-rows.js';
export { leaveOneOutResidual, shellRows } from './shell-rows.js';
export { meanSilhouette } from './silhouette.js';
export type { BootstrapZones, BootstrapZonesArgument } from './stability.js';
export {
  assignerOverDraws,
  bootstrapZones,
  sameZone,
  stabilityOf,
  stabilityTasks,
  zoneMeanErrors,
} from './stability.js';
export type { ZoneErrors } from './zone-errors.js';
export { unbiasedSpread, zoneErrors } from './zone-errors.js';
export type { CountCriteria, ZoneRowSupport } from './zone-rows.js';
export { adjacentZonesRows, zoneCountRows, zoneName, zoneRows } from './zone-rows.js';
export type { BedScatter } from './zone-scales.js';
export { bedScatters, zoneScales } from './zone-scales.js';
export type { Zoning, ZoningOptions } from './zoning.js';
export { bestLabels, findZones } from './zoning.js';
