import { AMINO_ACID_NAMES, FRACTIONS } from '../choices.js';

/* Columns that several tables share. */

export const clock = { type: 'text', description: 'clock: taxon, fraction and amino acid or index' } as const;
export const section = { type: 'text', description: 'section' } as const;
export const bed = { type: 'text', description: 'bed within the section' } as const;
export const taxon = { type: 'text', description: 'taxon, after aliases' } as const;
export const fraction = { type: 'choice', description: 'fraction of amino acids', values: FRACTIONS } as const;
export const zone = { type: 'text', description: 'zone; Z1 is the youngest' } as const;
export const aminoAcid = { type: 'choice', description: 'amino acid', values: AMINO_ACID_NAMES } as const;
export const zoneOrNone = { ...zone, nullable: true } as const;

/** A number of things. */
export const count = (description: string) => ({ type: 'integer', description, minimum: 0 }) as const;

/** A probability or a share, 0 to 1. */
export const share = (description: string) => ({ type: 'number', description, minimum: 0, maximum: 1 }) as const;
export const shareOrNone = (description: string) => ({ ...share(description), nullable: true }) as const;

/** A number in log ratios, or any other without a unit. */
export const plain = (description: string) => ({ type: 'number', description }) as const;
export const plainOrNone = (description: string) => ({ type: 'number', description, nullable: true }) as const;

/** A ratio on the D/L scale. */
export const ratio = (description: string) => ({ type: 'number', description, unit: 'D/L' }) as const;
export const ratioOrNone = (description: string) => ({ ...ratio(description), nullable: true }) as const;

/** A number in log ratios. */
export const logRatio = (description: string) => ({ type: 'number', description, unit: 'ln(D/L)' }) as const;
export const logRatioOrNone = (description: string) => ({ ...logRatio(description), nullable: true }) as const;

/** Free words. */
export const text = (description: string) => ({ type: 'text', description }) as const;
export const textOrNone = (description: string) => ({ type: 'text', description, nullable: true }) as const;
export const yes = (description: string) => ({ type: 'boolean', description }) as const;
export const list = <Item>(items: Item, description: string) => ({ type: 'list', items, description }) as const;

/** A number in a unit, unknown where null. */
export const measureOrNone = (unit: string, description: string) =>
  ({ type: 'number', description, unit, nullable: true }) as const;
