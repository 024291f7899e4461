/**
 * Something wrong or doubtful in the input: where it stands, what it is, and what to do.
 * `error` refuses the survey (exit status 2), `warning` lets it through.
 */
export interface Problem {
  /** Name of the file as the user gave it, without folders. */
  readonly file: string;
  /** Line in the file, from 1 (the header is line 1); null where no line is to blame. */
  readonly line: number | null;
  /** Header of the column as it stands in the file; null where no column is to blame. */
  readonly column: string | null;
  readonly severity: 'error' | 'warning';
  /** What was wanted, what came, and what to do. */
  readonly message: string;
}
