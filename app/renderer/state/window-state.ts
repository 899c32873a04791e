import type { LengthUnit, PointResult, Study, StudyResults } from '#engine';
import type {
  BasisSummary,
  Events,
  ProgramDescription,
  SampleSummary,
  SerializedError,
  StudyCheck,
} from '../../contract/requests';
import type { EnergyUnit } from '../units';
import { EMPTY_DRAFT, type StudyDraft } from './draft';

/** Everything that the window shows, as plain data. */
export interface WindowState {
  readonly draft: StudyDraft;
  readonly check: Check;
  /** what the curves belong to; absent before the first computation */
  readonly run: Run | undefined;
  readonly view: View;
  readonly catalogue: Catalogue;
  readonly notice: Notice | undefined;
}

/** What the checker said of the draft; `pending` while the latest typing has not been judged. */
export type Check =
  | { readonly kind: 'pending'; readonly last?: StudyCheck }
  | { readonly kind: 'judged'; readonly result: StudyCheck };

export interface Run {
  readonly status: 'computing' | 'done' | 'cancelled' | 'failed' | 'opened';
  readonly study: Study;
  readonly sentence: string;
  /** the study's text, to tell whether the sentence has been changed since */
  readonly text: string;
  /** by index; holes where a point has not arrived */
  readonly points: readonly (PointResult | undefined)[];
  readonly total: number;
  readonly progress: Events['calculation:progress'] | undefined;
  /** with findings; present when done or opened from a file */
  readonly results: StudyResults | undefined;
  readonly error: SerializedError | undefined;
}

/** What energies are measured from. */
export type EnergyReference = 'absolute' | 'ownMinimum' | 'farEnd';
export type Theme = 'system' | 'light' | 'dark';

export interface View {
  readonly energyUnit: EnergyUnit;
  /** undefined: the study's own */
  readonly lengthUnit: LengthUnit | undefined;
  readonly energyReference: EnergyReference;
  readonly theme: Theme;
  readonly hiddenLevels: readonly string[];
  /** vibrational levels are drawn in the well */
  readonly showsVibration: boolean;
  /** index of the point under the cursor; undefined: none chosen yet, the default place */
  readonly cursor: number | undefined;
}

export interface Catalogue {
  readonly program: ProgramDescription | undefined;
  readonly samples: readonly SampleSummary[];
  readonly bases: readonly BasisSummary[];
}

/** Something to tell the user that is no part of the study: a file that would not open, a host gone. */
export interface Notice {
  readonly title: string;
  readonly lines: readonly string[];
}

export const INITIAL_STATE: WindowState = {
  draft: EMPTY_DRAFT,
  check: { kind: 'pending' },
  run: undefined,
  view: {
    energyUnit: 'hartree',
    lengthUnit: undefined,
    energyReference: 'absolute',
    theme: 'system',
    hiddenLevels: [],
    showsVibration: true,
    cursor: undefined,
  },
  catalogue: { program: undefined, samples: [], bases: [] },
  notice: undefined,
};
