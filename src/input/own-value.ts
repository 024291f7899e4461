/** The value of a record's own key, else null: a name such as `constructor` from a file finds nothing. */
export function ownValue<T>(record: Readonly<Record<string, T>>, key: string): T | null {
  return Object.hasOwn(record, key) ? record[key] : null;
}
