import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { computePoint, type LevelResult } from '#engine';
import { parseStudy } from '../../app/study/parse-study';
import { prepare } from '../support/studies';

const FOLDER = new URL('../../sample-molecules/', import.meta.url);
const files = readdirSync(FOLDER);

const energyOf = (level: LevelResult | undefined) =>
  level && (level.kind === 'hartreeFock' || level.kind === 'correlated') ? level.energy : Number.NaN;

describe('sample molecules, computed', () => {
  it.each(files)(
    'identity: %s converges at both ends and in between, and its levels keep their order',
    (file) => {
      const reading = parseStudy(readFileSync(new URL(file, FOLDER), 'utf8'));
      if (!reading.ok) throw new Error(reading.issues[0]?.message);
      const prepared = prepare(reading.study);
      const { coordinates } = prepared;
      const chosen = [coordinates[0], coordinates[Math.floor(coordinates.length / 3)], coordinates.at(-1)];
      for (const coordinate of chosen) {
        const { levels } = computePoint(prepared, coordinate!).result;
        expect(Object.keys(levels)).toEqual(reading.study.levels);
        for (const level of Object.values(levels)) expect(level.converged).toBe(true);
        const sequence = Object.values(levels)
          .map(energyOf)
          .filter((energy) => !Number.isNaN(energy));
        // listed from RHF to full CI, each in a larger space than the one before
        for (let k = 1; k < sequence.length; k++)
          expect(sequence[k]).toBeLessThanOrEqual(sequence[k - 1] + 1e-10);
      }
    },
  );

  it.each(files)(
    'identity: %s binds: its curve falls to a well within the range and rises from it',
    (file) => {
      const reading = parseStudy(readFileSync(new URL(file, FOLDER), 'utf8'));
      if (!reading.ok || !reading.study.scan) throw new Error('no scan');
      const prepared = prepare(reading.study);
      const { coordinates } = prepared;
      const last = coordinates.length - 1;
      const places = [0, 0.1, 0.2, 0.3, 0.5, 1].map((part) => Math.round(part * last));
      const energies = places.map((place) =>
        energyOf(computePoint(prepared, coordinates[place]!, { levels: ['RHF'] }).result.levels.RHF),
      );
      const lowest = Math.min(...energies.slice(1, -1));
      expect(lowest).toBeLessThan(energies[0]! - 1e-3);
      expect(lowest).toBeLessThan(energies.at(-1)! - 1e-3);
    },
  );
});
