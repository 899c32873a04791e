import { appendFileSync, existsSync, readFileSync, truncateSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { openJournal } from '../../../app/calculation/journal';
import type { FinishedPoint } from '../../../app/calculation/messages';
import { temporaryFolder } from '../../support/temporary-folder';

const folder = temporaryFolder();
let files = 0;
const newPath = () => join(folder, `${++files}.jsonl`);

const point = (energy: number): FinishedPoint => ({
  result: {
    coordinate: 0.1 + 0.2,
    atoms: [],
    nuclearRepulsion: energy,
    levels: {},
    cautions: [{ code: 'a', message: 'long – “quoted”' }],
  },
  carry: { restricted: { alpha: Float64Array.of(1 / 3, energy), beta: Float64Array.of(energy), energy } },
});

/** A journal with points 0, 1 and 2, closed. */
function writtenJournal(): string {
  const path = newPath();
  const journal = openJournal(path, 'key');
  for (const index of [0, 1, 2]) journal.append(index, point(index));
  journal.close();
  return path;
}

describe('openJournal', () => {
  it('gives back what an earlier run appended, to the last bit', () => {
    const path = newPath();
    const first = openJournal(path, 'key');
    first.append(7, point(Number.NaN));
    first.append(3, point(-0));
    expect(first.size).toBe(2);
    first.close();
    const { finished, size, close } = openJournal(path, 'key');
    close();
    expect(size).toBe(2);
    expect([...finished.keys()]).toEqual([7, 3]);
    expect(finished.get(7)).toEqual(point(Number.NaN));
    expect(Object.is(finished.get(3)?.result.nuclearRepulsion, -0)).toBe(true);
  });

  it('has each point on the disk’s side as soon as `append` returns', () => {
    const path = newPath();
    const journal = openJournal(path, 'key');
    journal.append(0, point(1));
    const second = openJournal(path, 'key');
    expect(second.finished.size).toBe(1);
    second.close();
    journal.close();
  });

  it('starts anew for another key', () => {
    const path = writtenJournal();
    const journal = openJournal(path, 'other key');
    expect(journal.size).toBe(0);
    journal.close();
    expect(readFileSync(path, 'utf8').trimEnd().split('\n')).toHaveLength(1);
  });

  it('drops a last line that is torn, wherever it is torn, and goes on after the whole ones', () => {
    const whole = readFileSync(writtenJournal(), 'latin1');
    const lastLine = whole.lastIndexOf('\n', whole.length - 2) + 1;
    for (let length = lastLine; length < whole.length; length++) {
      const path = newPath();
      writeFileSync(path, whole.slice(0, length), 'latin1');
      const journal = openJournal(path, 'key');
      expect(journal.size).toBe(2);
      journal.append(2, point(2));
      journal.close();
      expect(readFileSync(path, 'latin1')).toBe(whole);
    }
  });

  it('starts anew when even the header is torn', () => {
    const path = writtenJournal();
    truncateSync(path, 20);
    const journal = openJournal(path, 'key');
    expect(journal.size).toBe(0);
    journal.append(0, point(0));
    journal.close();
    const again = openJournal(path, 'key');
    expect(again.size).toBe(1);
    again.close();
  });

  it('takes nothing from a line whose content was changed', () => {
    const path = writtenJournal();
    const text = readFileSync(path, 'latin1');
    const at = text.indexOf('"data":"', text.indexOf('"index":1')) + 40;
    writeFileSync(path, `${text.slice(0, at)}${text[at] === 'A' ? 'B' : 'A'}${text.slice(at + 1)}`, 'latin1');
    const journal = openJournal(path, 'key');
    expect([...journal.finished.keys()]).toEqual([0]);
    journal.close();
  });

  it('is not misled by lines that are not its own', () => {
    for (const line of ['null', '{}', '[]', 'x', '{"index":9,"data":null,"check":null}']) {
      const path = writtenJournal();
      appendFileSync(path, `${line}\n`);
      const journal = openJournal(path, 'key');
      expect(journal.size).toBe(3);
      journal.close();
    }
  });

  it('is gone after `remove`', () => {
    const path = newPath();
    const journal = openJournal(path, 'key');
    journal.remove();
    journal.close();
    expect(existsSync(path)).toBe(false);
  });
});
