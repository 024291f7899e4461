// Along the coast

export {
  conversionRemarks,
  gradientRemarks,
  laboratoryRemarks,
  someOf,
  staircaseRemarks,
  temperatureRemarks,
} from './coast-remarks.js';
export { correlationTable } from './correlation-table.js';
export { fitGradient, type GradientFit } from './gradient.js';
export { sectionOrder } from './section-order.js';
export { ONE_TERRACE_M, type Staircase, staircaseRelations } from './staircase.js';

// Several taxa

export { type CombinedTaxa, type ConvertedTaxon, combineTaxa, withoutSlope } from './combine-taxa.js';
export {
  type BedOfTaxon,
  type ConversionLine,
  convertLogRatio,
  type TaxonConversion,
  taxonConversion,
} from './taxon-conversion.js';

// Several laboratories

export { withLaboratoryErrors } from './laboratory-errors.js';
export { correctAnalyses, type LaboratoryOffset, laboratoryOffsets } from './laboratory-offsets.js';
