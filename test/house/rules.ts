import { builtinModules } from 'node:module';
import { posix } from 'node:path';

/** One source file: its path from src, and its text. */
export interface Code {
  readonly path: string;
  readonly text: string;
}

/** Rooms of the engine in the order in which they may know each other: each knows those before it. */
const ENGINE = ['screening', 'beds', 'zones', 'order', 'superposition', 'coast', 'planning'] as const;
const FLOOR = ['model', 'statistics'];

/** Who may know whom, beside itself (design, section 3). `.` stands for the files directly under src. */
const MAY_KNOW: Readonly<Record<string, readonly string[]>> = {
  model: [],
  statistics: [],
  ...Object.fromEntries(ENGINE.map((room, i) => [room, [...FLOOR, ...ENGINE.slice(0, i)]])),
  figures: FLOOR,
  report: [...FLOOR, 'figures', 'version.ts'],
  input: FLOOR,
  output: [...FLOOR, 'figures', 'report', 'version.ts'],
  commands: [...FLOOR, ...ENGINE, 'figures', 'report', 'input', 'output', '.', 'version.ts'],
  '.': [...FLOOR, ...ENGINE, 'version.ts'],
  'version.ts': [],
  'index.ts': [...FLOOR, ...ENGINE, 'figures', 'report', 'input', 'output', '.', 'version.ts'],
  'cli.ts': ['commands', '.', 'version.ts'],
};

/** Rooms that may touch files, the clock and the terminal. */
const HOSTS = ['input', 'output', 'commands', 'cli.ts'];

/** Libraries that live in a terminal or read files: for the host rooms only. */
const HOST_LIBRARIES = [
  'commander',
  'cli-progress',
  'picocolors',
  'read-excel-file',
  'yaml',
  'csv-parse',
  'csv-stringify',
];

/** The room of a file: its folder under src, or for the special files under src their own name. */
export function roomOf(path: string): string {
  if (['index.ts', 'cli.ts', 'version.ts'].includes(path)) return path;
  return path.includes('/') ? path.split('/')[0] : '.';
}

const STRING = `'(?:\\\\.|[^'\\\\\\n])*'|"(?:\\\\.|[^"\\\\\\n])*"`;

/** The code without its comments; strings stay. */
export function withoutComments(text: string): string {
  const token = new RegExp(`(${STRING}|\`(?:\\\\.|[^\`\\\\])*\`)|//[^\\n]*|/\\*[\\s\\S]*?\\*/`, 'g');
  return text.replace(token, (_whole, string: string | undefined) => string ?? ' ');
}

/** What a file imports or re-exports, statically or not; `values` leaves out what is imported as a type only. */
export function importsOf(file: Code, which: 'all' | 'values' = 'all'): string[] {
  const code = withoutComments(file.text);
  const pattern =
    /\b(?:import|export)\s+(type\s+)?(?:[\w*{][^'"`;]*?\sfrom\s*|[\w*{][^'"`;]*?\}\s*from\s*)?(['"])([^'"\n]+)\2|\bimport\(\s*(['"])([^'"\n]+)\4/g;
  return [...code.matchAll(pattern)]
    .filter((match) => which === 'all' || match[1] === undefined)
    .map((match) => match[3] ?? match[5]);
}

/** Every way in which a file breaks the rules, in words. */
export function breaches(file: Code): string[] {
  const room = roomOf(file.path);
  const allowed = MAY_KNOW[room];
  if (allowed === undefined) return [`${file.path}: the design has no room ${room}`];
  const found: string[] = [];
  const host = HOSTS.includes(room);
  for (const target of importsOf(file)) {
    if (target.startsWith('.')) {
      const path = posix.normalize(posix.join(posix.dirname(file.path), target));
      if (path.startsWith('..')) found.push(`imports ${target}, which lies outside src`);
      if (!/\.(js|json)$/.test(target)) found.push(`imports ${target}; a path of our own ends in .js`);
      const other = roomOf(path.replace(/\.js$/, '.ts'));
      if (
        !path.startsWith('..') &&
        other !== room &&
        !allowed.includes(other) &&
        !(other === 'index.ts' && room === 'commands')
      ) {
        found.push(`${room} may not know ${other} (imports ${target})`);
      }
    } else if (!host) {
      const name = target.replace(/^node:/, '').split('/')[0];
      if (target.startsWith('node:') || builtinModules.includes(name))
        found.push(`imports ${target}; only ${HOSTS.join(', ')} may touch the machine`);
      if (HOST_LIBRARIES.includes(name)) found.push(`imports ${target}, a library for ${HOSTS.join(', ')}`);
    }
  }
  const code = withoutComments(file.text).replace(new RegExp(STRING, 'g'), "''");
  if (!host) {
    for (const word of [
      /\bnew Date\b/,
      /\bDate\s*[.(]/,
      /\bMath\.random\b/,
      /\bprocess\./,
      /\bconsole\./,
      /\bperformance\./,
      /\bcrypto\./,
    ]) {
      const match = word.exec(code);
      if (match) found.push(`uses ${match[0].replace(/[.(]$/, '')}; chance, clock and terminal come in as arguments`);
    }
  }
  // results must be the same bytes whatever the language of the machine; the page's own script sorts for its reader
  const locale =
    file.path === 'report/script.ts' ? null : /\.localeCompare\(|\.toLocale\w+\(\s*\)|\bIntl\.\w+\(\s*\)/.exec(code);
  if (locale) found.push(`uses ${locale[0]}, which hangs on the language of the machine`);
  return found.map((breach) => `${file.path}: ${breach}`);
}
