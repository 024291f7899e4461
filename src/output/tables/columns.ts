import { AMINO_ACID_NAMES, FRACTIONS } from '../choices.js';

/* Columns that several tables share. */

/** The clock a row belongs to. */
export const clock = { type: 'text', description: 'clock: taxon, fraction and amino acid or index' } as const;
/** A section. */
export const section = { type: 'text', description: 'section' } as const;
/** A bed. */
export const bed = { type: 'text', description: 'bed within the section' } as const;
/** A taxon. */
export const taxon = { type: 'text', description: 'taxon, after aliases' } as const;
/** A fraction. */
export const fraction = { type: 'choice', description: 'fraction of amino acids', values: FRACTIONS } as const;
/** A zone. */
export const zone = { type: 'text', description: 'zone; Z1 is the youngest' } as const;
/** An amino acid. */
export const aminoAcid = { type: 'choice', description: 'amino acid', values: AMINO_ACID_NAMES } as const;
/** A zone, or none. */
export const zoneOrNone = { ...zone, nullable: true } as const;

/** A number of things. */
export const count = (description: string) => ({ type: 'integer', description, minimum: 0 }) as const;

/** A probability or a share, 0 to 1. */
export const share = (description: string) => ({ type: 'number', description, minimum: 0, maximum: 1 }) as const;
/** A share from 0 to 1, or unknown. */
export const shareOrNone = (description: string) => ({ ...share(description), nullable: true }) as const;

/** A number in log ratios, or any other without a unit. */
export const plain = (description: string) => ({ type: 'number', description }) as const;
/** A number without unit, or unknown. */
export const plainOrNone = (description: string) => ({ type: 'number', description, nullable: true }) as const;

/** A ratio on the D/L scale. */
export const ratio = (description: string) => ({ type: 'number', description, unit: 'D/L' }) as const;
/** A D/L ratio, or unknown. */
export const ratioOrNone = (description: string) => ({ ...ratio(description), nullable: true }) as const;

/** A number in log ratios. */
export const logRatio = (description: string) => ({ type: 'number', description, unit: 'ln(D/L)' }) as const;
/** A difference or value of log ratios, or unknown. */
export const logRatioOrNone = (description: string) => ({ ...logRatio(description), nullable: true }) as const;

/** Free words. */
export const text = (description: string) => ({ type: 'text', description }) as const;
/** A text, or none. */
export const textOrNone = (description: string) => ({ type: 'text', description, nullable: true }) as const;
/** True or false. */
export const yes = (description: string) => ({ type: 'boolean', description }) as const;
/** A list of like items. */
export const list = <Item>(items: Item, description: string) => ({ type: 'list', items, description }) as const;

/** A number in a unit, unknown where null. */
export const measureOrNone = (unit: string, description: string) =>
  ({ type: 'number', description, unit, nullable: true }) as const;
