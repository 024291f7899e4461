/** `section/bed` of a row. */
export const bedKey = (row: { readonly section: string; readonly bed: string }): string => `${row.section}/${row.bed}`;
