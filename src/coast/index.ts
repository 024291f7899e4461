// Along the coast

export { correlationTable } from './correlation-table.js';
export { fitGradient, type GradientFit } from './gradient.js';
export { gradientRemarks, temperatureRemarks } from './gradient-remarks.js';
export { sectionOrder } from './section-order.js';
export { ONE_TERRACE_M, type Staircase, staircaseRelations } from './staircase.js';
export { staircaseRemarks } from './staircase-remarks.js';

// Several taxa

export { type CombinedTaxa, type ConvertedTaxon, combineTaxa, withoutSlope } from './combine-taxa.js';
export { conversionRemarks } from './conversion-remarks.js';
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
export { laboratoryRemarks } from './laboratory-remarks.js';
