import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { type RunningProgram, startProgram } from '../support/built-program';
import { launchBrowser } from '../support/real-browser';

/* The window as users have it: the built program, served by `npm start -- --no-open`, in a real browser. */

const HYDROGEN = {
  format: 'farwell/study',
  version: 1,
  title: 'Hydrogen in a minimal basis',
  molecule: {
    unit: 'bohr',
    atoms: [
      { element: 'H', at: [0, 0, 0] },
      { element: 'H', at: [0, 0, 1.4] },
    ],
  },
  scan: { coordinate: { bonds: [[0, 1]] }, from: 1.4, to: 10, count: 12 },
  basis: 'STO-3G',
  levels: ['RHF', 'CIS', 'CISD', 'FCI'],
};

let host: RunningProgram;
let address: string;
let browser: Browser;

beforeAll(async () => {
  host = startProgram('start.js', ['--no-open']);
  const served = new Promise<string>((resolve) => {
    host.process.stdout?.on('data', (text) => resolve(String(text).trim()));
  });
  [address, browser] = await Promise.all([served, launchBrowser()]);
});

afterAll(async () => {
  await browser?.close();
  host?.process.kill('SIGTERM');
  await host?.ended;
});

const complaints: string[] = [];

/** A window of its own, which begins as for a new user. What any page complains of fails the test that saw it. */
async function openWindow(colorScheme: 'light' | 'dark' = 'light'): Promise<Page> {
  const context = await browser.newContext({ viewport: { width: 1280, height: 800 }, colorScheme });
  // the dialog of the system has no place in a test; without it the window downloads
  await context.addInitScript(() => Reflect.deleteProperty(window, 'showSaveFilePicker'));
  await context.addInitScript(() =>
    document.addEventListener('securitypolicyviolation', ({ violatedDirective, blockedURI }) => {
      // biome-ignore lint/suspicious/noConsole: heard by the test
      console.error(`forbidden by policy: ${violatedDirective} ${blockedURI}`);
    }),
  );
  const page = await context.newPage();
  page.on('console', (message) => {
    if (['error', 'warning'].includes(message.type())) complaints.push(message.text());
  });
  page.on('pageerror', ({ message }) => complaints.push(message));
  await page.goto(address);
  await page.getByText(/^Computed, \d+ points\.$/).waitFor(FIRST_PATIENCE);
  return page;
}

afterEach(() => expect(complaints.splice(0)).toEqual([]));

/** A calculation may share its cores with other tests. */
const PATIENCE = { timeout: 45_000 };
/** A cold browser reads megabytes of charts first. */
const FIRST_PATIENCE = { timeout: 110_000 };
/** The whole calculation takes minutes. */
const AT_ONCE = { timeout: 10_000 };

async function openStudy(study: unknown): Promise<void> {
  const [chooser] = await Promise.all([
    page.waitForEvent('filechooser'),
    page.getByRole('button', { name: 'Open…' }).click(),
  ]);
  const buffer = Buffer.from(JSON.stringify(study));
  await chooser.setFiles({ name: 'my.study.json', mimeType: 'application/json', buffer });
}

/** Another number of points each time tells a new curve from the one before. */
let opened = 0;

async function openHydrogen(): Promise<typeof HYDROGEN> {
  opened += 1;
  const study = { ...HYDROGEN, scan: { ...HYDROGEN.scan, count: HYDROGEN.scan.count + opened } };
  await openStudy(study);
  await page.getByText(`Computed, ${study.scan.count} points.`).waitFor(PATIENCE);
  for (const choice of ['absolute', 'hartree', 'bohr'])
    await page.getByRole('radio', { name: choice, exact: true }).click();
  return study;
}

const cursor = () => page.getByRole('slider', { name: 'Cursor on the curves' });
async function cellOf(level: string, column: number): Promise<string> {
  const row = page.getByRole('row', { name: new RegExp(`^${level}\\b`) }).first();
  return (await row.getByRole('cell').nth(column).textContent()) ?? '';
}
const asNumber = (text: string): number => Number(text.replace('−', '-'));

// opening a window takes longer than what is tried in it, so most tests share one and open their own study
let page: Page;
beforeAll(async () => {
  page = await openWindow();
});

/** Seven views, each with some hundred rules for every element. */
const RULES_TIMEOUT = 150_000;

describe('the window', () => {
  it('begins with a sample, its curves drawn and its cursor at the minimum', async () => {
    await page.locator('.main-svg').first().waitFor(PATIENCE);
    expect(await page.getByRole('textbox', { name: 'Title of the study' }).inputValue()).toMatch(/Hydrogen/);
    expect(await page.locator('.scatterlayer .trace').count()).toBeGreaterThan(3);
    await expect.poll(() => cursor().getAttribute('aria-valuetext')).toMatch(/^0\.\d+ Å; RHF −1\.1/);
  });

  it('shows the published energies of hydrogen at the cursor, which keys move', async () => {
    const { scan } = await openHydrogen();
    await cursor().focus();
    await page.keyboard.press('Home');
    await page.getByRole('heading', { name: 'At 1.4 a₀' }).waitFor();
    const source =
      'A. Szabo, N. S. Ostlund, Modern Quantum Chemistry (Dover, 1996), H2 in STO-3G at 1.4 bohr; value from memory';
    expect(asNumber(await cellOf('RHF', 0))).toMatchPublished({
      printed: '-1.1167',
      unit: 'hartree',
      source,
    });
    expect(asNumber(await cellOf('FCI', 1))).toMatchPublished({
      printed: '-0.0206',
      unit: 'hartree',
      source,
    });
    await page.keyboard.press('End');
    await page.getByRole('heading', { name: 'At 10 a₀' }).waitFor();
    await page.keyboard.press('ArrowLeft');
    await expect.poll(() => cursor().getAttribute('aria-valuenow')).toBe(String(scan.count - 2));
    // two electrons: singles and doubles are all there is
    expect(await cellOf('CISD', 0)).toBe(await cellOf('FCI', 0));
  });

  it('puts the cursor where the chart is pressed', async () => {
    await openHydrogen();
    await page.locator('.scatterlayer .trace').first().waitFor(PATIENCE);
    const box = (await cursor().boundingBox())!;
    await page.mouse.move(box.x + box.width * 0.9, box.y + box.height * 0.3);
    await page.mouse.click(box.x + box.width - 30, box.y + box.height * 0.3);
    await expect.poll(async () => Number(await cursor().getAttribute('aria-valuenow'))).toBeGreaterThan(9);
  });

  it('shows energies in the unit and from where they are wanted', async () => {
    await openHydrogen();
    const inHartree = asNumber(await cellOf('FCI', 0));
    await page.getByRole('radio', { name: 'electronvolt' }).click();
    await page.getByRole('columnheader', { name: 'Energy, eV' }).first().waitFor();
    expect(asNumber(await cellOf('FCI', 0)) / inHartree).toBeCloseTo(27.2113862, 5);
    await page.getByRole('radio', { name: 'above own minimum' }).click();
    await page.locator('.annotation-text', { hasText: 'Energy above own minimum, eV' }).waitFor(PATIENCE);
    await page.getByRole('radio', { name: 'ångström' }).click();
    await page.locator('.xtitle, .x2title', { hasText: 'Bond length, Å' }).waitFor(PATIENCE);
  });

  it('says at its place what is wrong, keeps what was typed, and computes once it is right', async () => {
    await openHydrogen();
    const to = page.getByRole('textbox', { name: 'To' });
    await to.fill('six');
    const wrongEnd = page.locator('.sentence').getByText('The end must be a number; it is "six".');
    await wrongEnd.waitFor();
    expect(await to.inputValue()).toBe('six');
    expect(await to.getAttribute('aria-invalid')).toBe('true');
    const note = await to.evaluate((input) => {
      const id = input.getAttribute('aria-describedby')?.split(' ')[0] ?? '';
      return document.getElementById(id)?.textContent;
    });
    expect(note).toContain('must be a number');
    expect(await page.getByRole('button', { name: 'Compute' }).isDisabled()).toBe(true);
    await page.reload();
    await wrongEnd.waitFor(PATIENCE);
    expect(await to.inputValue()).toBe('six');
    await to.fill('5');
    await page.getByRole('textbox', { name: 'Steps' }).fill('4');
    await page.getByRole('button', { name: 'Compute' }).click();
    await page.getByText('Computed, 4 points.').waitFor(PATIENCE);
  });

  it('refuses what the engine refuses, at the molecule', async () => {
    await openHydrogen();
    await page.getByRole('button', { name: /^Molecule:/ }).click();
    await page.getByRole('textbox', { name: 'Multiplicity' }).fill('2');
    const molecule = page.getByRole('button', { name: /^Molecule:/, includeHidden: true });
    await expect.poll(() => molecule.getAttribute('data-wrong'), PATIENCE).toBe('true');
    await page.getByRole('textbox', { name: 'Element of atom 0' }).fill('Hx');
    await page.keyboard.press('Escape');
    await page.getByRole('button', { name: 'Molecule: HHx' }).waitFor();
    await page.getByText(/“Hx”/).first().waitFor();
  });

  it('takes pasted lines of atoms', async () => {
    await page.getByRole('button', { name: /^Molecule:/ }).click();
    await page.getByRole('textbox', { name: /paste lines/ }).fill('Li 0 0 0\nH 0 0 1.5949');
    await page.getByRole('button', { name: 'Replace the atoms' }).click();
    expect(await page.getByRole('textbox', { name: 'z of atom 1' }).inputValue()).toBe('1.5949');
    await page.keyboard.press('Escape');
    await page.getByRole('button', { name: 'Molecule: LiH' }).waitFor();
  });

  it('cancels at once and keeps the points that are there', async () => {
    await openStudy({
      ...HYDROGEN,
      molecule: {
        unit: 'angstrom',
        atoms: [
          { element: 'N', at: [0, 0, 0] },
          { element: 'N', at: [0, 0, 1.1] },
        ],
      },
      scan: { coordinate: { bonds: [[0, 1]] }, from: 0.9, to: 3, count: 2000 },
      levels: ['RHF', 'FCI'],
    });
    await page.getByRole('button', { name: 'Molecule: N₂' }).waitFor();
    await page.getByRole('button', { name: 'Compute' }).click();
    await page.getByText(/^[1-9]\d* of 2000 points/).waitFor(PATIENCE);
    await page.getByRole('button', { name: 'Cancel' }).click();
    await page.getByText(/^Cancelled; \d+ of 2000 points are kept\.$/).waitFor(AT_ONCE);
    await page.getByRole('button', { name: 'Compute' }).waitFor(AT_ONCE);
  });

  it('saves figure, table, study and results', async () => {
    const hydrogen = await openHydrogen();
    const saved = async (name: RegExp) => {
      await page.getByRole('button', { name: 'Save' }).click();
      const downloading = page.waitForEvent('download', PATIENCE);
      await page.getByRole('menuitem', { name }).click();
      const download = await downloading;
      return { name: download.suggestedFilename(), bytes: await readFile(await download.path()) };
    };
    const svg = await saved(/SVG/);
    expect(svg.name).toBe('hydrogen-in-a-minimal-basis.svg');
    const drawing = svg.bytes.toString();
    expect(drawing).toMatch(/^<svg/);
    expect(drawing).toContain(`Pull the H–H bond of H₂ from 1.4 to 10 bohr in ${hydrogen.scan.count} steps`);
    expect(drawing).toMatch(/<text[^>]*>.*Energy, Eₕ/s);
    expect(drawing).not.toContain('Source Sans');

    const png = await saved(/PNG/);
    expect(png.bytes.subarray(1, 4).toString()).toBe('PNG');
    expect(png.bytes.readUInt32BE(16)).toBe(2700);

    const csv = await saved(/CSV/);
    expect(csv.bytes.toString()).toMatch(/^coordinate,RHF,CIS 1 ¹Σu⁺,CIS 1 ³Σu⁺,CISD,FCI\r\n1\.4,-1\.11\d+,/);
    expect(csv.bytes.toString().trim().split('\r\n')).toHaveLength(1 + hydrogen.scan.count);

    const study = await saved(/^Study/);
    expect(JSON.parse(study.bytes.toString())).toMatchObject(hydrogen);

    const report = await saved(/^Report, PDF/);
    expect(report.name).toBe('hydrogen-in-a-minimal-basis.report.pdf');
    expect(report.bytes.subarray(0, 5).toString()).toBe('%PDF-');
    const geometry = await saved(/^Geometry/);
    expect(geometry.bytes.toString()).toMatch(/^# H₂, [\d.]+ a₀; x y z in bohr\nH .+\nH .+\n$/);

    const results = await saved(/^Results/);
    const { points } = JSON.parse(results.bytes.toString());
    expect(points).toHaveLength(hydrogen.scan.count);
    await page.getByRole('textbox', { name: 'Title of the study' }).fill('changed');
    await openStudy(JSON.parse(results.bytes.toString()));
    await page.getByText('Opened from a file.').waitFor();
    expect(await cellOf('RHF', 0)).toMatch(/^−1\.11/);
  });

  it('says why a file is refused and leaves the study alone', async () => {
    await openHydrogen();
    await openStudy({ ...HYDROGEN, level: ['RHF'] });
    const alert = page.getByRole('alert');
    await alert.getByText('my.study.json cannot be opened').waitFor();
    expect(await alert.textContent()).toContain('“levels”');
    expect(await page.getByRole('textbox', { name: 'Title of the study' }).inputValue()).toBe(HYDROGEN.title);
    await alert.getByRole('button', { name: 'Close' }).click();
    await alert.waitFor({ state: 'detached' });
  });

  it('follows the system into the dark, unless told otherwise, also the next time', async () => {
    const background = () => page.evaluate(() => getComputedStyle(document.body).backgroundColor);
    await page.emulateMedia({ colorScheme: 'dark' });
    await expect.poll(background).toBe('rgb(16, 20, 22)');
    await page.getByRole('radio', { name: 'light', exact: true }).click();
    await expect.poll(background).toBe('rgb(243, 244, 241)');
    await page.reload();
    await page.getByRole('button', { name: 'Compute' }).waitFor(PATIENCE);
    await expect.poll(background).toBe('rgb(243, 244, 241)');
  });

  it.each(['light', 'dark'] as const)(
    'breaks no accessibility rule that axe can check, %s',
    async (colorScheme) => {
      const page = await openWindow(colorScheme);
      const axe = await readFile(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
      await page.evaluate(axe);
      const violations = () =>
        page.evaluate(async () => {
          const { axe: checker } = window as unknown as { axe: typeof import('axe-core') };
          const { violations: found } = await checker.run({
            runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'],
          });
          return found.map(
            ({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 120)).join(' | ')}`,
          );
        });
      expect(await violations()).toEqual([]);
      for (const editor of [
        /^Molecule:/,
        /^What is scanned:/,
        /^Basis set:/,
        /^Levels and states:/,
        /^Findings wanted/,
      ]) {
        await page.getByRole('button', { name: editor }).first().click();
        await page.getByRole('dialog').waitFor();
        expect(await violations()).toEqual([]);
        await page.keyboard.press('Escape');
        await page.getByRole('dialog').waitFor({ state: 'detached' });
      }
      for (const tab of ['Findings', 'All points']) {
        await page.getByRole('tab', { name: tab }).click();
        expect(await violations()).toEqual([]);
      }
    },
    RULES_TIMEOUT,
  );
});
