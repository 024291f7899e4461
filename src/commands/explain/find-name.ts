import { editDistance } from '../../input/edit-distance.js';
import type { Findings } from '../../model/index.js';
import { refused } from '../../output/folder/output-error.js';

/** What a name stands for. */
export type Named =
  | { readonly kind: 'bed'; readonly bed: string }
  | { readonly kind: 'shell'; readonly shell: string }
  /** `a` was named as the older of the two; with two bare beds the field relation decides, if there is one. */
  | { readonly kind: 'relation'; readonly a: string; readonly b: string };

/**
 * Finds what is meant by one name, or by two beds: `section/bed`, `section/bed/shell`, `a > b`, `a < b`, in any case of
 * letters. The section may be left out where only one bed or shell is so called.
 *
 * @throws OutputError with the names that are near, or the choices of a name that may mean several things.
 */
export function findName(findings: Findings, names: readonly string[]): Named {
  const known = knownNames(findings);
  if (names.length === 1) {
    const exact = exactly(known, names[0]);
    if (exact) return exact;
    const sides = names[0].split(/\s*[<>]\s*/);
    if (sides.length === 2 && sides.every((side) => side !== '')) {
      const [first, second] = sides.map((side) => bedOf(known, side));
      return names[0].includes('>') ? relation(first, second) : relation(second, first);
    }
    return onlyOne(known, names[0], [...known.beds, ...known.shells]);
  }
  // a name with spaces, given without quotation marks
  const joined = exactly(known, names.join(' '));
  if (joined) return joined;
  const words = names.filter((name) => !/^(?:[<>]|and|to|over|under)$/i.test(name));
  if (words.length === 2) {
    const [first, second] = words.map((word) => bedOf(known, word));
    return names.includes('<') ? relation(second, first) : relation(first, second);
  }
  return findName(findings, [names.join(' ')]);
}

interface Known {
  readonly beds: readonly string[];
  readonly shells: readonly string[];
}

function knownNames(findings: Findings): Known {
  const beds = [...findings.sites, ...findings.beds].map(({ section, bed }) => `${section}/${bed}`);
  const shells = [...findings.shell_ratios, ...findings.shells].map((row) => `${row.section}/${row.bed}/${row.shell}`);
  return { beds: [...new Set(beds)], shells: [...new Set(shells)] };
}

function plain(name: string): string {
  return name
    .normalize('NFC')
    .toLowerCase()
    .replace(/\s*\/\s*/g, '/')
    .replace(/\s+/g, ' ')
    .trim();
}

function named(known: Known, name: string): Named {
  return known.beds.includes(name) ? { kind: 'bed', bed: name } : { kind: 'shell', shell: name };
}

function relation(a: string, b: string): Named {
  if (a === b) throw refused(`${a} was named twice; two different beds were wanted.`);
  return { kind: 'relation', a, b };
}

// letter by letter first, then in any case
function exactly(known: Known, name: string): Named | null {
  const all = [...known.beds, ...known.shells];
  if (all.includes(name)) return named(known, name);
  const found = all.filter((one) => plain(one) === plain(name));
  if (found.length > 1) throw several(name, found);
  return found.length === 1 ? named(known, found[0]) : null;
}

function bedOf(known: Known, name: string): string {
  const found = exactly({ beds: known.beds, shells: [] }, name) ?? onlyOne(known, name, known.beds);
  if (found.kind !== 'bed') throw refused(`${name}: a bed was wanted, as section/bed.`);
  return found.bed;
}

// a bed or shell by its last part, where that is enough
function onlyOne(known: Known, name: string, all: readonly string[]): Named {
  const ending = all.filter((one) => plain(one).endsWith(`/${plain(name)}`));
  const beds = ending.filter((one) => known.beds.includes(one));
  const found = beds.length > 0 ? beds : ending;
  if (found.length > 1) throw several(name, found);
  if (found.length === 0) throw unknown(name, all, known);
  return named(known, found[0]);
}

function several(name: string, found: readonly string[]) {
  const shown = found.slice(0, 12).map((one) => `  ${one}`);
  const more = found.length > 12 ? [`  … and ${found.length - 12} more`] : [];
  return refused([`${name} may mean several; name one of them in full:`, ...shown, ...more].join('\n'));
}

function unknown(name: string, all: readonly string[], known: Known) {
  const wanted = plain(name);
  const inside = known.beds.filter((bed) => plain(bed).startsWith(`${wanted}/`));
  if (inside.length > 0) return several(name, inside);
  const limit = Math.max(2, Math.floor(wanted.length / 4));
  const near = all
    .map((one) => ({ one, distance: distanceTo(wanted, one, limit) }))
    .filter(({ distance }) => distance <= limit)
    .sort((a, b) => a.distance - b.distance)
    .filter(({ distance }, _, [nearest]) => distance === nearest.distance)
    .slice(0, 3)
    .map(({ one }) => one);
  if (near.length > 0) return refused(`The results know no ${name}. Did you mean ${near.join(' or ')}?`);
  const some = known.beds.slice(0, 5).join(', ');
  return refused(`The results know no ${name}. Beds are named section/bed, for example ${some}.`);
}

// to the whole name, or to its last part
function distanceTo(wanted: string, name: string, limit: number): number {
  const full = editDistance(wanted, plain(name), limit);
  if (wanted.includes('/')) return full;
  const last = plain(name.slice(name.lastIndexOf('/') + 1));
  return last.length < 4 ? full : Math.min(full, editDistance(wanted, last, limit));
}
