/**
 * What one input file may hold. The limits keep a wrong or hostile file from filling memory; real surveys are far below
 * them. A file beyond a limit is refused with the limit and with advice, never cut short in silence.
 */
export const LIMITS = {
  /** Bytes of a table on disk; a survey of two million rows has about 200 MB. */
  fileBytes: 256 * 1024 * 1024,
  /** Bytes an .xlsx may have once unpacked. */
  unpackedBytes: 512 * 1024 * 1024,
  /** Bytes of a settings file. */
  settingsBytes: 64 * 1024,
  /** Rows of a table below its header. */
  rows: 2_000_000,
  columns: 1_000,
  /** Beds of a survey. */
  beds: 200_000,
  /** Numeric columns of the beds table kept for `--gradient`, beyond the known ones. */
  gradientColumns: 100,
  /** Errors after which reading stops. */
  errors: 10_000,
  /** Characters of one cell. */
  cellCharacters: 10_000,
  /** Lines searched for the header. */
  headerSearch: 10,
  /** Problems of one kind listed by themselves in one file; the rest are counted. */
  problemsOfOneKind: 20,
} as const;
