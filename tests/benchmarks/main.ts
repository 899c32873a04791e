import process from 'node:process';
import { parseArgs } from 'node:util';
import { GROUPS, LARGE_GROUPS } from './groups';
import { measureGrowth, writeGrowth } from './growth';
import type { Measurement } from './measure';
import { measurementTable } from './measurement-table';
import { comparePredictions } from './predictions';

/*
 * `npm run bench` measures how fast Farwell is on this machine, beside yardsticks measured in the same run.
 *
 *   npm run bench                     the table
 *   npm run bench -- --json           only JSON on standard output: [{ name, ours, yardstick, unit, ratio }]
 *   npm run bench -- --only PATTERN   groups or lines whose name holds it, in any case
 *   npm run bench -- --large          instead, what takes minutes: the product over 64 million determinants
 *   npm run bench -- --predictions     what `farwell check` predicts for the samples beside what they take
 *   npm run bench -- --growth         how cost grows: into the README's section, with its figure
 */

const { values: options } = parseArgs({
  options: {
    json: { type: 'boolean', default: false },
    only: { type: 'string', default: '' },
    large: { type: 'boolean', default: false },
    growth: { type: 'boolean', default: false },
    predictions: { type: 'boolean', default: false },
  },
});

const say = (text: string) => void process.stderr.write(`${text}\n`);

if (options.growth) {
  const files = await writeGrowth(await measureGrowth(say));
  for (const file of files) console.log(file);
} else if (options.predictions) {
  console.log(comparePredictions(options.only));
} else {
  const measured = await measureAll(options.large ? LARGE_GROUPS : GROUPS, options.only);
  console.log(options.json ? JSON.stringify(measured.map(asData), null, 2) : measurementTable(measured));
}

/** Groups that the pattern names; where it names none, the lines that it names of all groups. */
async function measureAll(groups: typeof GROUPS, pattern: string): Promise<readonly Measurement[]> {
  const holdsPattern = (name: string) => name.toLowerCase().includes(pattern.toLowerCase());
  const chosen = groups.filter(({ name }) => holdsPattern(name));
  const measured: Measurement[] = [];
  for (const { name, measure } of chosen.length > 0 ? chosen : groups) {
    say(`measuring ${name} …`);
    measured.push(...(await measure()));
  }
  return chosen.length > 0 ? measured : measured.filter(({ name }) => holdsPattern(name));
}

function asData({ name, ours, yardstick, unit }: Measurement) {
  return { name, ours, yardstick, unit, ratio: ours / yardstick };
}
