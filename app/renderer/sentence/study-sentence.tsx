import { Fragment, type ReactNode } from 'react';
import type { StudyIssue } from '../../contract/requests';
import { type SentencePartName, sentenceParts } from '../../study/sentence';
import { LabelledField } from '../controls/labelled-field';
import { numbered } from '../numbered';
import type { ScanDraft, StudyDraft } from '../state/draft';
import { BasisEditor } from './basis-editor';
import { CoordinateEditor } from './coordinate-editor';
import { studyForWording } from './draft-study';
import { IssueNote } from './issue-note';
import { LevelsEditor } from './levels-editor';
import { MoleculeEditor } from './molecule-editor';
import { placeIssues } from './place-issues';
import { PopoverPart } from './popover-part';
import { TextPart } from './text-part';

interface StudySentenceProps {
  readonly draft: StudyDraft;
  readonly issues: readonly StudyIssue[];
  readonly onEdit: (change: (draft: StudyDraft) => StudyDraft) => void;
}

/** The study as one sentence; every value is a control, and what is wrong is written behind it. */
export function StudySentence({ draft, issues, onEdit }: StudySentenceProps) {
  const parts = sentenceParts(studyForWording(draft));
  const placed = placeIssues(issues, parts);
  return (
    <>
      <div className="sentence">
        {numbered(parts).map(({ number, item: { text, part } }) => (
          <Fragment key={part ?? number}>
            {part === undefined ? (
              text
            ) : (
              <Bracket
                part={part}
                text={text}
                issues={placed.get(part) ?? []}
                draft={draft}
                onEdit={onEdit}
              />
            )}
          </Fragment>
        ))}
      </div>
      <IssueNote at="study" issues={placed.get('study') ?? []} />
    </>
  );
}

interface BracketProps extends StudySentenceProps {
  readonly part: SentencePartName;
  readonly text: string;
}

function Bracket({ part, text, issues, draft, onEdit }: BracketProps): ReactNode {
  const editors = { draft, issues, onEdit };
  const isListed = draft.scan.spacing === 'listed';
  switch (part) {
    case 'molecule':
      return (
        <PopoverPart part={part} name="Molecule" text={text || 'no atoms'} issues={issues} className="wide">
          <MoleculeEditor {...editors} />
        </PopoverPart>
      );
    case 'bonds':
      return (
        <PopoverPart part={part} name="What is scanned" text={text || 'no bond'} issues={issues}>
          <CoordinateEditor {...editors} />
        </PopoverPart>
      );
    case 'basis':
      return (
        <PopoverPart part={part} name="Basis set" text={text} issues={issues}>
          <BasisEditor {...editors} />
        </PopoverPart>
      );
    case 'levels':
    case 'states':
    case 'core':
      return (
        <PopoverPart part={part} name="Levels and states" text={text.replaceAll('NaN', '?')} issues={issues}>
          <LevelsEditor {...editors} />
        </PopoverPart>
      );
    case 'from':
    case 'to':
      return isListed ? text.replace('NaN', '?') : <ScanNumber field={part} {...{ part, ...editors }} />;
    case 'steps':
      return isListed ? (
        <PopoverPart part={part} name="Values" text={text} issues={issues}>
          <LabelledField
            label="Values, separated by commas or spaces"
            lines={6}
            value={draft.scan.values}
            onChange={(values) => onEdit((current) => ({ ...current, scan: { ...current.scan, values } }))}
          />
        </PopoverPart>
      ) : (
        <ScanNumber field="count" {...{ part, ...editors }} />
      );
  }
}

const FIELD_NAMES = { from: 'From', to: 'To', count: 'Steps' } as const;

/** How far an arrow key changes a length; an angle; and a number of steps. */
const LENGTH_STEP = 0.1;
const ANGLE_STEP = 5;

interface ScanNumberProps extends StudySentenceProps {
  readonly part: SentencePartName;
  readonly field: keyof typeof FIELD_NAMES & keyof ScanDraft;
}

function ScanNumber({ part, field, issues, draft, onEdit }: ScanNumberProps) {
  const step = field === 'count' ? 1 : draft.scan.coordinate === 'bonds' ? LENGTH_STEP : ANGLE_STEP;
  return (
    <TextPart
      part={part}
      name={FIELD_NAMES[field]}
      value={draft.scan[field]}
      issues={issues}
      step={step}
      onChange={(typed) => onEdit((current) => ({ ...current, scan: { ...current.scan, [field]: typed } }))}
    />
  );
}
