import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { parseStudy } from '../../app/study/parse-study';
import { studySentence } from '../../app/study/sentence';
import { serialiseStudy } from '../../app/study/serialise';
import { buildMolecule } from '../../engine/molecule/build-molecule';
import { measureCoordinate } from '../../engine/molecule/coordinate';
import { checkScan, scanGeometries } from '../../engine/molecule/scan-coordinate';

const FOLDER = new URL('../../sample-molecules/', import.meta.url);
const ENDING = '.study.json';
const names = readdirSync(FOLDER).map((file) => file.slice(0, -ENDING.length));

function readSample(name: string) {
  const text = readFileSync(new URL(`${name}${ENDING}`, FOLDER), 'utf8');
  const reading = parseStudy(text);
  if (!reading.ok) throw new Error(reading.issues.map(({ message }) => message).join('\n'));
  return { text, study: reading.study };
}

/** What each sample is to say of itself. */
const SENTENCES: Readonly<Record<string, string>> = {
  beh2: 'Pull both Be–H bonds of BeH₂ together from 0.9 to 4 Å in 32 steps',
  bh: 'Pull the B–H bond of BH from 0.8 to 4.5 Å in 38 steps',
  co: 'Pull the C–O bond of CO from 0.85 to 3 Å in 32 steps',
  h2: 'Pull the H–H bond of H₂ from 0.4 to 5 Å in 38 steps',
  h2o: 'Pull both O–H bonds of H₂O together from 0.6 to 3 Å in 37 steps',
  'h3-plus': 'Pull one H–H bond of H₃⁺ from 1 to 7 bohr in 37 steps',
  'heh-plus': 'Pull the He–H bond of HeH⁺ from 0.4 to 6 Å in 40 steps',
  hf: 'Pull the H–F bond of HF from 0.6 to 3.5 Å in 30 steps',
  li2: 'Pull the Li–Li bond of Li₂ from 1.6 to 9 Å in 38 steps',
  lih: 'Pull the Li–H bond of LiH from 0.9 to 6 Å in 35 steps',
  n2: 'Pull the N–N bond of N₂ from 0.8 to 3.2 Å in 33 steps',
  nh3: 'Pull one N–H bond of NH₃ from 0.65 to 3.5 Å in 39 steps',
};

describe('sample molecules', () => {
  it('are the ones promised', () => {
    expect(names.sort()).toEqual(Object.keys(SENTENCES).sort());
  });

  it.each(names)('%s: says what it does, with a title, a scenario and the source of its geometry', (name) => {
    const { study } = readSample(name);
    expect(studySentence(study)).toContain(SENTENCES[name]);
    expect(study.title).toBeTruthy();
    expect(study.notes).toMatch(/^.{60,}\n\nGeometry: .*\(?(19|20)\d\d\)/s);
  });

  it.each(names)('%s: is written as the program itself would write it', (name) => {
    const { text, study } = readSample(name);
    expect(serialiseStudy(study)).toBe(text);
  });

  it.each(names)('%s: every geometry of its scan is sound and has the scanned length', (name) => {
    const { molecule, scan } = readSample(name).study;
    if (!scan) throw new Error('no scan');
    expect(checkScan(molecule, scan)).toEqual([]);
    for (const point of scanGeometries(molecule, scan)) {
      expect(buildMolecule(point.molecule)).toMatchObject({ ok: true, molecule: { multiplicity: 1 } });
      for (const length of measureCoordinate(point.molecule, scan.coordinate)) {
        expect(Math.abs(length - point.value)).toBeLessThan(1e-12);
      }
    }
  });

  it.each(names.filter((name) => name !== 'h3-plus'))(
    '%s: starts at its equilibrium, within its range',
    (name) => {
      const { molecule, scan } = readSample(name).study;
      if (!scan || 'values' in scan) throw new Error('no range');
      for (const length of measureCoordinate(molecule, scan.coordinate)) {
        expect(length).toBeGreaterThan(scan.from);
        expect(length).toBeLessThan(scan.to / 2);
      }
    },
  );

  it('h3-plus: passes through the equilateral triangle of the free ion at 1.65 bohr', () => {
    const { molecule } = readSample('h3-plus').study;
    const coordinate = { bonds: [[0, 2]] } as const;
    const [triangle] = scanGeometries(molecule, { coordinate, values: [1.65] });
    const sides = {
      bonds: [
        [0, 1],
        [1, 2],
        [0, 2],
      ],
    } as const;
    // the file gives coordinates to six decimals
    for (const side of measureCoordinate(triangle!.molecule, sides)) expect(side).toBeCloseTo(1.65, 6);
  });
});
