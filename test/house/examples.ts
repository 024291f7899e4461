import { transformSync } from 'esbuild';

/** One example: where it stands, and its code. */
export interface Example {
  readonly where: string;
  readonly code: string;
}

/** The code of every `@example` block of a source file, docstring stars and fences taken off. */
export function examplesOfSource(path: string, text: string): Example[] {
  const lines = text.split('\n');
  const found: Example[] = [];
  lines.forEach((line, start) => {
    if (!/^\s*\*\s*@example\b|^\s*\/\*\*\s*@example\b/.test(line)) return;
    const code: string[] = [line.replace(/^.*@example\s*/, '').replace(/\*\/\s*$/, '')];
    if (!line.includes('*/')) {
      for (let i = start + 1; i < lines.length; i++) {
        if (/^\s*\*\/|^\s*\*\s*@\w/.test(lines[i])) break;
        code.push(lines[i].replace(/^\s*\* ?/, '').replace(/\*\/\s*$/, ''));
        if (lines[i].includes('*/')) break;
      }
    }
    found.push({ where: `${path}:${start + 1}`, code: code.filter((row) => !/^\s*```/.test(row)).join('\n') });
  });
  return found;
}

/** Fenced blocks of a page whose info string is `lang run`, for example "```ts run". */
export function examplesOfPage(path: string, text: string, language: string): Example[] {
  const pattern = new RegExp(`^ *\`\`\`${language} run\\n([\\s\\S]*?)^ *\`\`\`$`, 'gm');
  return [...text.matchAll(pattern)].map((match) => ({
    where: `${path}:${text.slice(0, match.index).split('\n').length}`,
    code: match[1],
  }));
}

/** A promise of an example: an expression or a declared name, and the text after `// =>`. */
interface Promised {
  readonly before: string;
  readonly value: string;
  readonly expected: string;
}

const parses = (code: string): boolean => {
  try {
    transformSync(`async () => {${code}\n}`, { loader: 'ts', logLevel: 'silent' });
    return true;
  } catch {
    return false;
  }
};

/** Cuts an example into statements and the values promised for them. */
export function promisesOf(example: Example): { promises: Promised[]; rest: string } {
  const promises: Promised[] = [];
  let pending: string[] = [];
  const lines = example.code.split('\n');
  for (let i = 0; i < lines.length; i++) {
    const match = /^(.*?)\/\/ =>\s?(.*)$/.exec(lines[i]);
    if (!match) {
      pending.push(lines[i]);
      continue;
    }
    let expected = match[2].trim();
    while (!parses(`(${withoutEllipsis(expected)})`) && /^\s*\/\/(?! =>)/.test(lines[i + 1] ?? '')) {
      i += 1;
      expected += ` ${lines[i].replace(/^\s*\/\/\s?/, '').trim()}`;
    }
    // a promise may stand on a line of its own, under the expression
    pending.push(match[1]);
    const { before, value } = lastStatement(pending, example.where);
    promises.push({ before, value, expected });
    pending = [];
  }
  return { promises, rest: pending.join('\n') };
}

/** Splits code into what goes before and its last statement's value. */
function lastStatement(lines: readonly string[], where: string): { before: string; value: string } {
  const used = lines.filter((line) => line.trim() !== '');
  for (let start = used.length - 1; start >= 0; start--) {
    const before = used.slice(0, start).join('\n');
    const last = used.slice(start).join('\n').trim().replace(/;$/, '');
    if (!parses(before)) continue;
    const declared = /^(?:const|let)\s+(\w+)\s*(?::[^=]+)?=/.exec(last);
    if (declared && parses(last)) return { before: `${before}\n${last};`, value: declared[1] };
    if (!declared && parses(`return (${last}\n)`)) return { before, value: last };
    // several statements on one line: `const a = f(); a.b // => 1`
    const cut = last.lastIndexOf(';');
    if (cut > 0 && parses(`${before}\n${last.slice(0, cut + 1)}`) && parses(`return (${last.slice(cut + 1)}\n)`)) {
      return { before: `${before}\n${last.slice(0, cut + 1)}`, value: last.slice(cut + 1) };
    }
  }
  throw new Error(`${where}: found no expression before "// =>" in\n${lines.join('\n')}`);
}

const NUMBER = /(?<![\w$.])-?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?(?:…)?(?![\w$])/gi;
const withoutEllipsis = (text: string) => text.replaceAll('…', '');

/** A number as it is written: it stands for every value that rounds to it. */
export interface Written {
  readonly written: number;
  readonly tolerance: number;
}

/** The half unit of the last digit written; a whole unit after `…`; exact for whole numbers. */
export function writtenNumber(text: string): Written {
  const bare = withoutEllipsis(text);
  const [mantissa, exponent = '0'] = bare.toLowerCase().split('e');
  const decimals = mantissa.includes('.') ? mantissa.split('.')[1].length : 0;
  const unit = 10 ** (Number(exponent) - decimals);
  const written = Number(bare);
  const rounding = decimals === 0 && exponent === '0' ? 0 : text.endsWith('…') ? unit : unit / 2;
  return { written, tolerance: Math.max(rounding * (1 + 1e-9), 1e-12 * Math.abs(written)) };
}

/** JavaScript text whose numbers became {@link Written}; strings stay. */
function numbersAsWritten(text: string): string {
  return text.replace(/'(?:\\.|[^'\\])*'|"(?:\\.|[^"\\])*"|`(?:\\.|[^`\\])*`|[^'"`]+/g, (part) =>
    /^['"`]/.test(part) ? part : part.replace(NUMBER, (number) => `__written('${number}')`),
  );
}

/** Where an actual value differs from the promised one; null where it agrees. */
export function difference(actual: unknown, promised: unknown, at = 'value'): string | null {
  if (promised !== null && typeof promised === 'object' && 'written' in promised && 'tolerance' in promised) {
    const { written, tolerance } = promised as Written;
    const near = typeof actual === 'number' && Math.abs(actual - written) <= tolerance;
    return near ? null : `${at} is ${show(actual)}, promised ${written}`;
  }
  if (Array.isArray(promised)) {
    const list = ArrayBuffer.isView(actual) ? [...(actual as unknown as Iterable<unknown>)] : actual;
    if (!Array.isArray(list)) return `${at} is ${show(actual)}, promised a list`;
    if (list.length !== promised.length)
      return `${at} has ${list.length} items, promised ${promised.length}: ${show(list)}`;
    for (let i = 0; i < list.length; i++) {
      const found = difference(list[i], promised[i], `${at}[${i}]`);
      if (found) return found;
    }
    return null;
  }
  if (promised !== null && typeof promised === 'object') {
    if (actual === null || typeof actual !== 'object') return `${at} is ${show(actual)}, promised an object`;
    const keys = new Set([...Object.keys(promised), ...Object.keys(actual)]);
    for (const key of keys) {
      const found = difference(
        (actual as Record<string, unknown>)[key],
        (promised as Record<string, unknown>)[key],
        `${at}.${key}`,
      );
      if (found) return found;
    }
    return null;
  }
  return Object.is(actual, promised) ? null : `${at} is ${show(actual)}, promised ${show(promised)}`;
}

function show(value: unknown): string {
  return typeof value === 'string' ? `'${value}'` : (JSON.stringify(value) ?? String(value));
}

/** `import { a, b as c } from 'x'` as a call that the runner answers. */
function importsAsCalls(code: string): string {
  return code
    .replace(/^\s*import type .*$/gm, '')
    .replace(/^\s*import\s+\{([^}]*)\}\s*from\s*(['"][^'"]+['"]);?/gm, (_all, names: string, from: string) => {
      const values = names.split(',').filter((name) => name.trim() !== '' && !/^\s*type\s/.test(name));
      return `const {${values.map((name) => name.replace(/\sas\s/, ': ')).join(',')}} = await __import(${from});`;
    });
}

/**
 * Runs an example and holds every promised value against what comes out.
 *
 * @param names what the example may use without importing it
 * @param load answers the example's own imports
 * @returns what differs, one line each, and how many values were compared
 */
export async function runExample(
  example: Example,
  names: Readonly<Record<string, unknown>>,
  load: (from: string) => Promise<unknown>,
): Promise<{ compared: number; differences: string[] }> {
  const { promises, rest } = promisesOf({ ...example, code: importsAsCalls(example.code) });
  const parts = promises.map(({ before, value, expected }) => {
    const wanted = numbersAsWritten(expected);
    if (!parses(`return (${wanted})`))
      throw new Error(`${example.where}: "// => ${expected}" is no value; write the value itself`);
    const thrown = /^throws\b/.test(expected);
    if (thrown) throw new Error(`${example.where}: write the value after "// =>", not ${expected}`);
    return `${before}\n__check(await (${value}\n), (${wanted}));`;
  });
  const code = [...parts, rest].join('\n');
  const script = transformSync(`return (async () => {${code}\n})()`, { loader: 'ts', target: 'es2023' }).code;
  const differences: string[] = [];
  let compared = 0;
  const check = (actual: unknown, promised: unknown) => {
    compared += 1;
    const found = difference(actual, promised);
    if (found) differences.push(`${example.where}: ${found}`);
  };
  const usable = Object.keys(names).filter((name) => /^[A-Za-z_$][\w$]*$/.test(name) && name !== 'default');
  const run = new Function('__check', '__written', '__import', ...usable, script);
  await run(check, writtenNumber, load, ...usable.map((name) => names[name]));
  return { compared, differences };
}
