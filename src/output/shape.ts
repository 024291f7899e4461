/**
 * A small language in which the columns of the tables and the parts of results.json are described once: name, type,
 * unit and meaning. The CSV writer, datapackage.json and the JSON Schema are all made from the same descriptions.
 *
 * `Shape<T>` accepts only a description that fits T: every field named, none invented, null said where T allows it,
 * and every word of a union with its meaning. So a change of a type in src/model that is not followed here does not
 * compile.
 */
export type Shape<T> = Meaning & Nullable<T> & Kind<Plain<T>>;

/** One description a field of T, in the order in which the fields are written. */
export type FieldsOf<T> = { readonly [Key in keyof T]-?: Shape<T[Key]> };

/** What every description says. */
export interface Meaning {
  readonly description: string;
  /** Unit of a number; absent where it has none. */
  readonly unit?: string;
  readonly minimum?: number;
  readonly maximum?: number;
}

type Plain<T> = Exclude<T, null | undefined>;
type Nullable<T> = (null extends T ? { readonly nullable: true } : { readonly nullable?: never }) &
  (undefined extends T ? { readonly optional: true } : { readonly optional?: never });

type Kind<T> = [T] extends [boolean]
  ? { readonly type: 'boolean' }
  : [T] extends [number]
    ? { readonly type: 'number' | 'integer' }
    : [T] extends [string]
      ? string extends T
        ? { readonly type: 'text' }
        : { readonly type: 'choice'; readonly values: Readonly<Record<T, string>> }
      : [T] extends [readonly (infer Item)[]]
        ? { readonly type: 'list'; readonly items: Shape<Item> }
        : [T] extends [object]
          ? string extends keyof T
            ? { readonly type: 'map'; readonly items: Shape<T[keyof T]> }
            : { readonly type: 'object'; readonly fields: FieldsOf<T> }
          : { readonly type: 'either'; readonly of: readonly AnyShape[] };

/** Any description, for the code that walks over them. */
export type AnyShape = Meaning & { readonly nullable?: boolean; readonly optional?: boolean } & (
    | { readonly type: 'boolean' | 'number' | 'integer' | 'text' }
    | { readonly type: 'choice'; readonly values: Readonly<Record<string, string>> }
    | { readonly type: 'list' | 'map'; readonly items: AnyShape }
    | { readonly type: 'object'; readonly fields: AnyFields }
    | { readonly type: 'either'; readonly of: readonly AnyShape[] }
  );

/** Descriptions by field name, in written order. */
export type AnyFields = Readonly<Record<string, AnyShape>>;
