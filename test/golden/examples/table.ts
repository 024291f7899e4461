/** Rows as text; cells that hold the separator or a quote are quoted. */
export function tableText(rows: readonly (readonly (string | number | null)[])[], separator = ','): string {
  const cell = (value: string | number | null) => {
    const text = value === null ? '' : String(value);
    return text.includes(separator) || text.includes('"') ? `"${text.replaceAll('"', '""')}"` : text;
  };
  return `${rows.map((row) => row.map(cell).join(separator)).join('\n')}\n`;
}

/** Text of a number with a fixed number of decimals. */
export const fixed = (value: number, decimals: number): string => value.toFixed(decimals);
