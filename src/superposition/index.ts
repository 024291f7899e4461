// Field relations and sections against bed means

export {
  type BedMean,
  checkRelations,
  type RelationCheck,
  type RelationCheckOptions,
  type RelationToCheck,
} from './relation-checks.js';
export {
  checkSections,
  type PlacedBed as BedOfSection,
  type SectionCheck,
  type SectionCheckOptions,
  type SectionOfBeds,
} from './section-consistency.js';

// Shells against superposition

export { bedsAbove } from './beds-above.js';
export { conflictThreshold } from './conflict-threshold.js';
export { costOfShell } from './cost-of-shell.js';
export {
  type BedInOrder,
  type ConflictOptions,
  findShellConflicts,
  listConflicts,
  type ShellConflicts,
  type ShellInOrder,
} from './shell-conflicts.js';
export { type ShellsToSetAside, shellsToSetAside } from './shells-to-set-aside.js';

// Shells against their own bed and themselves

export { type Agreement, aminoAcidAgreement } from './amino-acid-agreement.js';
export { type OwnBedResidual, type OwnBedResiduals, ownBedResiduals } from './own-bed-residuals.js';
export { type RobustScatter, robustScatter } from './robust-scatter.js';
export { matchZone, type ZoneMatch, type ZoneToMatch } from './zone-match.js';

// Readings of shells, beds and relations

export type { AminoAcidDifference, BedFacts, Explanation, ReversedRelation } from './explanations.js';
export { type MixedAge, type MixedAgeOptions, mixedAgeBeds } from './mixed-age.js';
export { readingOfShell } from './reading-of-shell.js';
export {
  MOST_SHELLS_SPOKEN_OF,
  type ReadingInput,
  type ReadingsAhead,
  readAhead,
  readShells,
  type ShellFinding,
  type ShellReadings,
} from './readings.js';
export { type RelationReading, readReversedRelation } from './relation-readings.js';
export { confidenceOfReading, statusOfShell } from './shell-status.js';
export { bestSplit, type Split } from './two-groups.js';
