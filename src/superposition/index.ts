// Field relations and sections against bed means

export { type Agreement, aminoAcidAgreement } from './amino-acid-agreement.js';
// Shells against superposition
export { bedsAbove } from './beds-above.js';
export { conflictThreshold } from './conflict-threshold.js';
export { costOfShell } from './cost-of-shell.js';
export { type MixedAge, type MixedAgeOptions, mixedAgeBeds } from './mixed-age.js';
export { type OwnBedResidual, type OwnBedResiduals, ownBedResiduals } from './own-bed-residuals.js';
// Readings
export { readingOfShell } from './reading-of-shell.js';
export { type ReadingInput, readShells, type ShellFinding, type ShellReadings } from './readings.js';
export {
  type BedMean,
  checkRelations,
  type RelationCheck,
  type RelationCheckOptions,
  type RelationToCheck,
} from './relation-checks.js';
export {
  type AminoAcidDifference,
  type BedFacts,
  type Explanation,
  type RelationReading,
  type ReversedRelation,
  readReversedRelation,
} from './relation-readings.js';
// Shells against their own bed and themselves
export { type RobustScatter, robustScatter } from './robust-scatter.js';
export {
  checkSections,
  type PlacedBed as BedOfSection,
  type SectionCheck,
  type SectionCheckOptions,
  type SectionOfBeds,
} from './section-consistency.js';
export {
  type BedInOrder,
  type ConflictOptions,
  findShellConflicts,
  listConflicts,
  type ShellConflicts,
  type ShellInOrder,
} from './shell-conflicts.js';
export { confidenceOfReading, statusOfShell } from './shell-status.js';
export { type ShellsToSetAside, shellsToSetAside } from './shells-to-set-aside.js';
export { bestSplit, type Split } from './two-groups.js';
export { matchZone, type ZoneMatch, type ZoneToMatch } from './zone-match.js';
