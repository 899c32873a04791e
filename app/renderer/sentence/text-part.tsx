import { Input, TextField } from 'react-aria-components';
import type { StudyIssue } from '../../contract/requests';
import { IssueNote, noteId } from './issue-note';
import type { IssuePlace } from './place-issues';

interface TextPartProps {
  readonly part: IssuePlace;
  readonly name: string;
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly issues: readonly StudyIssue[];
  /** up and down arrows add and take this much; absent: they do nothing */
  readonly step?: number;
}

/** A bracket of the sentence that is typed into directly and keeps whatever is typed. */
export function TextPart({ part, name, value, onChange, issues, step }: TextPartProps) {
  const isWrong = issues.length > 0;
  return (
    <>
      <TextField
        className="typedBracket"
        data-part={part}
        aria-label={name}
        value={value}
        onChange={onChange}
        isInvalid={isWrong}
        {...(isWrong && { 'aria-describedby': noteId(part) })}
        onKeyDown={(event) => {
          const direction = event.key === 'ArrowUp' ? 1 : event.key === 'ArrowDown' ? -1 : 0;
          const stepped =
            direction === 0 || step === undefined ? undefined : stepNumber(value, direction * step);
          if (stepped === undefined) return;
          event.preventDefault();
          onChange(stepped);
        }}
      >
        <Input
          className="bracket"
          inputMode="decimal"
          spellCheck={false}
          autoComplete="off"
          size={Math.max(1, value.length)}
        />
      </TextField>
      <IssueNote at={part} issues={issues} />
    </>
  );
}

/** The number with the step added, free of the noise of binary fractions; undefined if it is not a number. */
export function stepNumber(typed: string, step: number): string | undefined {
  const value = Number(typed.trim().replace('−', '-'));
  if (typed.trim() === '' || !Number.isFinite(value)) return undefined;
  return String(Number((value + step).toFixed(10)));
}
