import type { BedRegister } from './bed-register.js';
import { editDistance } from './edit-distance.js';
import type { ProblemList } from './problem-list.js';
import { squash } from './squash.js';

/** A taxon's name, how many rows bear it, and the first of them. */
export interface TaxonCount {
  readonly name: string;
  readonly rows: number;
  readonly line: number;
}

/** Names beyond this number are not compared with each other. */
const MOST_NAMES = 1_000;

/**
 * Warns of taxon names one or two letters apart, all spellings of one name in one warning, with the lines of an aliases
 * table that join them to the name with the most rows.
 */
export function checkTaxonNames(taxa: readonly TaxonCount[], file: string, problems: ProblemList): void {
  for (const group of groupsOf(taxa, (a, b) => nearTaxa(a.name, b.name))) {
    const main = group.reduce((best, taxon) => (taxon.rows > best.rows ? taxon : best));
    const others = group.filter((taxon) => taxon !== main);
    const named = joinWords(
      group.map((taxon) => `"${taxon.name}" (${taxon.rows} ${taxon.rows === 1 ? 'row' : 'rows'})`),
    );
    const lines = others.map((taxon) => `${csvCell(taxon.name)},${csvCell(main.name)}`).join(' | ');
    problems.warning(
      'taxon names',
      { file, line: Math.min(...others.map((taxon) => taxon.line)), column: 'taxon' },
      `The taxon names ${named} are nearly the same, and are kept apart. If they are one taxon, correct the spelling, or give --aliases ` +
        `a table with the header name,taxon and ${others.length === 1 ? 'the line' : 'the lines'} ${lines}`,
    );
  }
}

/**
 * Whether two taxon names may be one misspelt: the same but for case, spaces and signs; or word by word at most one
 * letter apart in words of four or more letters, two in words of six or more, two in all. Words of fewer letters, and
 * words with digits (`sp. 1`, `sp. 2`), must be alike.
 *
 * @example
 * nearTaxa('Macoma balthica', 'Macoma baltica') // => true
 * @example
 * nearTaxa('Mya arenaria', 'Mya truncata') // => false
 * @example
 * nearTaxa('Astarte sp. A', 'Astarte sp. B') // => false
 */
export function nearTaxa(a: string, b: string): boolean {
  if (squash(a) === squash(b)) return true;
  const wordsA = wordsOf(a);
  const wordsB = wordsOf(b);
  if (wordsA.length !== wordsB.length) {
    const joinedA = wordsA.join('');
    const joinedB = wordsB.join('');
    return (
      joinedA.length >= 8 &&
      joinedB.length >= 8 &&
      !/\d/.test(joinedA + joinedB) &&
      editDistance(joinedA, joinedB, 1) <= 1
    );
  }
  let total = 0;
  for (let i = 0; i < wordsA.length; i += 1) {
    if (wordsA[i] === wordsB[i]) continue;
    const shorter = Math.min(wordsA[i].length, wordsB[i].length);
    const allowed = shorter >= 6 ? 2 : shorter >= 4 ? 1 : 0;
    if (allowed === 0 || /\d/.test(wordsA[i] + wordsB[i])) return false;
    const distance = editDistance(wordsA[i], wordsB[i], allowed);
    if (distance > allowed) return false;
    total += distance;
  }
  return total <= 2;
}

function wordsOf(name: string): string[] {
  return name
    .toLowerCase()
    .normalize('NFKC')
    .split(/[^\p{L}\p{N}]+/u)
    .filter((word) => word !== '');
}

/** Warns of section names, and of bed names of one section, that differ in case, spaces or signs only. */
export function checkPlaceNames(beds: BedRegister, problems: ProblemList): void {
  const warn = (what: string, names: readonly string[], first: { file: string; line: number }) =>
    problems.warning(
      `${what} names`,
      first,
      `The ${what} names ${joinWords(names.map((name) => `"${name}"`))} differ in case, spaces or signs only, and are kept apart. Use one spelling if they are one ${what}.`,
    );
  const sections = new Map<string, string[]>();
  const firstOf = new Map<string, { file: string; line: number }>();
  for (const [section, ofSection] of beds.sections()) {
    push(sections, looseKey(section), section);
    firstOf.set(section, ofSection.values().next().value!.first);
    if (ofSection.size < 2) continue;
    const names = new Map<string, string[]>();
    for (const bed of ofSection.keys()) push(names, looseKey(bed), bed);
    for (const group of names.values()) {
      if (group.length > 1)
        warn(
          'bed',
          group.map((bed) => `${section}/${bed}`),
          ofSection.get(group[1])!.first,
        );
    }
  }
  for (const group of sections.values()) if (group.length > 1) warn('section', group, firstOf.get(group[1])!);
}

/** Refuses two beds whose `section/bed` is the same text, such as bed `c` of `a/b` and bed `b/c` of `a`. */
export function checkBedKeys(beds: BedRegister, problems: ProblemList): void {
  const known = new Map<string, { section: string; bed: string }>();
  for (const entry of beds.all()) {
    const key = `${entry.section}/${entry.bed}`;
    const other = known.get(key);
    if (other === undefined) {
      known.set(key, entry);
      continue;
    }
    problems.error(
      'bed names',
      entry.first,
      `Bed "${entry.bed}" of section "${entry.section}" and bed "${other.bed}" of section "${other.section}" would both be called ${key}. Rename one without the slash.`,
    );
  }
}

/** Signs are kept where nothing else tells names apart: `1+` and `1-` are two beds. */
function looseKey(name: string): string {
  return name.toLowerCase().replace(/[\s_-]+/g, '');
}

function push(map: Map<string, string[]>, key: string, value: string): void {
  const known = map.get(key);
  if (known === undefined) map.set(key, [value]);
  else known.push(value);
}

/** Groups of two or more that are linked by likeness, in order of first appearance. */
function groupsOf<T>(items: readonly T[], alike: (a: T, b: T) => boolean): T[][] {
  const list = items.slice(0, MOST_NAMES);
  const home = list.map((_, i) => i);
  const root = (i: number): number => {
    let at = i;
    while (home[at] !== at) at = home[at];
    return at;
  };
  for (let i = 0; i < list.length; i += 1) {
    for (let j = i + 1; j < list.length; j += 1) {
      const [a, b] = [root(i), root(j)];
      if (a !== b && alike(list[i], list[j])) home[Math.max(a, b)] = Math.min(a, b);
    }
  }
  const groups = new Map<number, T[]>();
  list.forEach((item, i) => {
    const at = root(i);
    const group = groups.get(at);
    if (group === undefined) groups.set(at, [item]);
    else group.push(item);
  });
  return [...groups.values()].filter((group) => group.length > 1);
}

function joinWords(words: readonly string[]): string {
  return words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words[words.length - 1]}`;
}

function csvCell(text: string): string {
  return /[",;\t]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
