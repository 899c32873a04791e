import type { StudyExplanation, StudyResults } from '#engine';
import type { HostConnection, ReportPart, StudyCheck } from '../../contract/requests';
import { studySentence } from '../../study/sentence';
import type { FileToSave } from '../files/save-file';
import { CalculationFeed } from './calculation-feed';
import type { StudyDraft } from './draft';
import { draftFromStudy } from './draft-from-study';
import { readOpened } from './opened-file';
import type { Memory } from './remembered';
import type { Store } from './store';
import { studyText } from './study-text';
import type { View } from './window-state';

export interface Surroundings {
  readonly host: HostConnection;
  readonly memory: Memory;
  /** typing settles for a moment before it is judged */
  readonly afterTyping: (callback: () => void) => void;
  readonly onNextFrame: (callback: () => void) => void;
  readonly saveFile: (file: FileToSave) => Promise<void>;
}

/** Shown when nothing was typed before: hydrogen, done in a moment. */
const FIRST_SAMPLE = 'h2';

/** What is computed without being asked for: a few seconds of work at most. */
const UNASKED_SECONDS = 4;

/** The window's dealings with its host: what the panels call, and what changes the store. */
export class WindowController {
  readonly #store: Store;
  readonly #host: HostConnection;
  readonly #memory: Memory;
  readonly #afterTyping: Surroundings['afterTyping'];
  readonly #saveFile: Surroundings['saveFile'];
  readonly #feed: CalculationFeed;
  #latestCheck = 0;
  #latestStart = 0;

  constructor(store: Store, { host, memory, afterTyping, onNextFrame, saveFile }: Surroundings) {
    this.#store = store;
    this.#host = host;
    this.#memory = memory;
    this.#afterTyping = afterTyping;
    this.#saveFile = saveFile;
    this.#feed = new CalculationFeed(
      host,
      {
        advanced: (points, progress) => store.dispatch({ kind: 'run/advanced', points, progress }),
        finished: (outcome) => store.dispatch({ kind: 'run/finished', outcome }),
      },
      onNextFrame,
    );
  }

  /** Fills the window: the lists, then what was typed last time or else the first sample. */
  async begin(): Promise<void> {
    const { draft, view } = this.#memory.load();
    if (view !== undefined) this.#store.dispatch({ kind: 'view/changed', change: view });
    const [program, samples, bases] = await Promise.all([
      this.#host.request('program:describe'),
      this.#host.request('samples:list'),
      this.#host.request('basis:list'),
    ]);
    this.#store.dispatch({
      kind: 'catalogue/received',
      catalogue: {
        ...(program.ok && { program: program.value }),
        ...(samples.ok && { samples: samples.value }),
        ...(bases.ok && { bases: bases.value }),
      },
    });
    for (const reply of [program, samples, bases])
      if (!reply.ok) this.#refuse('The program’s lists cannot be read', [reply.error]);
    const known = samples.ok ? samples.value : [];
    const firstSample = known.find(({ id }) => id === FIRST_SAMPLE) ?? known[0];
    if (draft !== undefined) await this.#showDraft(draft);
    else if (firstSample !== undefined) await this.openSample(firstSample.id);
  }

  edit(change: (draft: StudyDraft) => StudyDraft): void {
    this.#store.dispatch({ kind: 'draft/edited', change });
    this.#remember();
    this.#latestCheck += 1;
    const number = this.#latestCheck;
    this.#afterTyping(() => {
      if (number === this.#latestCheck) void this.#check();
    });
  }

  changeView(change: Partial<View>): void {
    this.#store.dispatch({ kind: 'view/changed', change });
    this.#remember();
  }

  dismissNotice(): void {
    this.#store.dispatch({ kind: 'notice/dismissed' });
  }

  async openSample(id: string): Promise<void> {
    const reply = await this.#host.request('samples:open', { id });
    if (reply.ok) await this.openText(reply.value.name, reply.value.text);
    else this.#refuse('The sample cannot be opened', [reply.error]);
  }

  /** Hands a file to the surroundings, and says so if it could not be written. */
  async save(file: FileToSave): Promise<void> {
    try {
      await this.#saveFile(file);
    } catch (error) {
      const message = error instanceof Error ? error.message : String(error);
      this.#refuse(`${file.suggestedName} was not saved`, [
        { place: '', message, remedy: 'Try again, or save it somewhere else.' },
      ]);
    }
  }

  /** One file of the report of results, made by the host. @throws Error with what the host says */
  async reportFile(results: StudyResults, name: string, part: ReportPart): Promise<Blob> {
    const text = JSON.stringify(results);
    const reply = await this.#host.request('report:make', { results: [{ name, text }], part });
    if (!reply.ok) throw new Error(`${reply.error.message} ${reply.error.remedy}`);
    const [file] = reply.value.files;
    if (file === undefined) throw new Error('The report has no such part.');
    return new Blob([Uint8Array.from(atob(file.base64), (character) => character.charCodeAt(0))]);
  }

  /** A study or a results file, told apart by its `format`. What is refused leaves the window as it was. */
  async openText(name: string, text: string): Promise<void> {
    const opened = readOpened(text);
    switch (opened.kind) {
      case 'refused':
        this.#refuse(`${name} cannot be opened`, opened.issues);
        return;
      case 'study':
        await this.#showDraft(draftFromStudy(opened.study));
        return;
      case 'results': {
        this.cancel();
        const draft = draftFromStudy(opened.results.study);
        this.#store.dispatch({ kind: 'draft/replaced', draft });
        this.#store.dispatch({
          kind: 'results/opened',
          results: opened.results,
          sentence: studySentence(opened.results.study),
          text: studyText(draft).text,
        });
        this.#remember();
        await this.#check();
        return;
      }
    }
  }

  /** Starts what the sentence says, if the checker let it pass. */
  async compute(): Promise<void> {
    const { check, draft } = this.#store.get();
    if (check.kind !== 'judged' || !check.result.ok) return;
    this.cancel();
    const { text } = studyText(draft);
    const { study, sentence, explanation } = check.result;
    this.#latestStart += 1;
    const number = this.#latestStart;
    this.#feed.expect();
    this.#store.dispatch({ kind: 'run/started', run: { study, sentence, text, total: explanation.points } });
    const reply = await this.#host.request('calculation:start', { text });
    if (number !== this.#latestStart) {
      // cancelled before the host had answered
      if (reply.ok) await this.#host.request('calculation:cancel', { id: reply.value.id });
    } else if (reply.ok) this.#feed.follow(reply.value.id);
    else {
      this.#feed.stop();
      this.#store.dispatch({ kind: 'run/refused', error: reply.error });
    }
  }

  /** Answers at once: the window lets go, and the host is told. */
  cancel(): void {
    if (this.#store.get().run?.status !== 'computing') return;
    const id = this.#feed.following;
    this.#latestStart += 1;
    this.#feed.stop();
    this.#store.dispatch({ kind: 'run/finished', outcome: { kind: 'cancelled' } });
    if (id !== undefined) void this.#host.request('calculation:cancel', { id });
  }

  async #showDraft(draft: StudyDraft): Promise<void> {
    this.cancel();
    this.#store.dispatch({ kind: 'draft/replaced', draft });
    this.#remember();
    const result = await this.#check();
    if (result?.ok && this.#isQuick(result.explanation)) await this.compute();
  }

  /** @returns the verdict, or undefined if it was overtaken by more typing */
  async #check(): Promise<StudyCheck | undefined> {
    this.#latestCheck += 1;
    const number = this.#latestCheck;
    const { text, issues } = studyText(this.#store.get().draft);
    const reply =
      issues.length > 0
        ? ({ ok: true, value: { ok: false, issues } } as const)
        : await this.#host.request('study:check', { text });
    if (number !== this.#latestCheck) return undefined;
    const result: StudyCheck = reply.ok ? reply.value : { ok: false, issues: [reply.error] };
    this.#store.dispatch({ kind: 'check/received', result });
    return result;
  }

  #isQuick({ points, levels }: StudyExplanation): boolean {
    const workers = this.#store.get().catalogue.program?.workers ?? 1;
    const secondsPerPoint = levels.reduce((sum, { seconds }) => sum + seconds, 0);
    return (points * secondsPerPoint) / workers <= UNASKED_SECONDS;
  }

  #remember(): void {
    const { draft, view } = this.#store.get();
    const { energyUnit, lengthUnit, energyReference, showsVibration, theme } = view;
    this.#memory.save({ draft, view: { energyUnit, lengthUnit, energyReference, showsVibration, theme } });
  }

  #refuse(
    title: string,
    reasons: readonly { readonly place: string; readonly message: string; readonly remedy: string }[],
  ): void {
    const lines = reasons.map(
      ({ place, message, remedy }) => `${place === '' ? '' : `${place}: `}${message} ${remedy}`,
    );
    this.#store.dispatch({ kind: 'notice/shown', notice: { title, lines } });
  }
}
