import type { RelationRecord } from '../model/index.js';
import type { BedRegister } from './bed-register.js';
import type { ProblemList } from './problem-list.js';
import { type Step, shortestPath, stronglyConnected } from './step-graph.js';

/** Starts the name of a point between two places; no bed's name holds this character. */
const NAMELESS = '\u0000';

/**
 * Refuses circles of relations: certain relations of the table together with superposition from places and certain
 * `same` relations. Of every knot of contradictions one whole circle is printed, as short as can be.
 */
export function checkCircles(relations: readonly RelationRecord[], beds: BedRegister, problems: ProblemList): void {
  const steps = [...stepsOfTable(relations), ...stepsOfPlaces(beds)];
  const out = new Map<string, Step[]>();
  for (const step of steps) {
    const known = out.get(step.from);
    if (known === undefined) out.set(step.from, [step]);
    else known.push(step);
  }
  const knots = stronglyConnected(out);
  const done = new Set<number>();
  for (const step of steps) {
    // A circle needs one `>`; beds joined by `same` alone are one knot without contradiction.
    if (step.sign !== '>' || step.row === null) continue;
    const knot = knots.get(step.from);
    if (knot === undefined || knot !== knots.get(step.to) || done.has(knot)) continue;
    const back = shortestPath(step.to, step.from, out, (bed) => knots.get(bed) === knot);
    done.add(knot);
    report([step, ...back], problems);
  }
  for (const step of steps) {
    // The only relations of the table in a circle may be `same`: two beds of one section said to be as old.
    if (step.sign !== '>') continue;
    const knot = knots.get(step.from);
    if (knot === undefined || knot !== knots.get(step.to) || done.has(knot)) continue;
    done.add(knot);
    report([step, ...shortestPath(step.to, step.from, out, (bed) => knots.get(bed) === knot)], problems);
  }
}

function report(circle: readonly Step[], problems: ProblemList): void {
  const rows = circle.flatMap((step) => (step.row === null ? [] : [step.row]));
  const last = rows.reduce((a, b) => (b.line > a.line ? b : a));
  const named = circle.filter((step) => !step.from.startsWith(NAMELESS));
  const text = named.map((step) => `${step.from} ${step.sign} `).join('') + named[0].from;
  const lines = [...new Set(rows.map((row) => row.line))].sort((a, b) => a - b);
  const fromPlaces = circle.some((step) => step.row === null) ? ', and on the places of beds in their sections' : '';
  problems.error(
    'circle',
    { file: last.file, line: last.line },
    `The relations run in a circle ("a > b": a is older; "a = b": as old): ${text}. It rests on ${
      lines.length === 1 ? 'line' : 'lines'
    } ${lines.join(', ')}${fromPlaces}. Correct one of them, or call one probable.`,
  );
}

function stepsOfTable(relations: readonly RelationRecord[]): Step[] {
  return relations.flatMap(({ lower, upper, kind, certainty, row }): Step[] => {
    if (certainty !== 'certain') return [];
    if (kind === 'older') return [{ from: lower, to: upper, sign: '>', row }];
    return [
      { from: lower, to: upper, sign: '=', row },
      { from: upper, to: lower, sign: '=', row },
    ];
  });
}

/** Each bed to those at the next place above it; beds at one place are not ordered. */
function stepsOfPlaces(beds: BedRegister): Step[] {
  const steps: Step[] = [];
  for (const [section, ofSection] of beds.sections()) {
    const placed = [...ofSection.values()]
      .filter((entry) => entry.place !== null)
      .map((entry) => ({
        name: `${section}/${entry.bed}`,
        up: entry.place!.kind === 'depth_m' ? -entry.place!.value : entry.place!.value,
      }))
      .sort((a, b) => a.up - b.up);
    const places: string[][] = [];
    placed.forEach(({ name, up }, i) => {
      if (i > 0 && up === placed[i - 1].up) places[places.length - 1].push(name);
      else places.push([name]);
    });
    for (let i = 0; i + 1 < places.length; i += 1) {
      // By way of a nameless point, so that many beds at one place do not make a square of steps.
      const between = `${NAMELESS}${section}/${i}`;
      const single = places[i].length === 1 && places[i + 1].length === 1;
      if (single) steps.push({ from: places[i][0], to: places[i + 1][0], sign: '>', row: null });
      else {
        for (const from of places[i]) steps.push({ from, to: between, sign: '>', row: null });
        for (const to of places[i + 1]) steps.push({ from: between, to, sign: '>', row: null });
      }
    }
  }
  return steps;
}
