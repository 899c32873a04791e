import type { ReactNode } from 'react';
import { Button, Dialog, DialogTrigger, Heading, Popover } from 'react-aria-components';
import type { StudyIssue } from '../../contract/requests';
import { IssueNote, noteId } from './issue-note';
import type { IssuePlace } from './place-issues';

interface PopoverPartProps {
  readonly part: IssuePlace;
  /** what the control is, for the ear and as the popover's heading */
  readonly name: string;
  readonly text: string;
  readonly issues: readonly StudyIssue[];
  readonly className?: string;
  readonly children: ReactNode;
}

/** A bracket of the sentence that opens an editor beneath itself. */
export function PopoverPart({ part, name, text, issues, className, children }: PopoverPartProps) {
  const isWrong = issues.length > 0;
  return (
    <>
      <DialogTrigger>
        <Button
          className="bracket"
          data-part={part}
          data-wrong={isWrong || undefined}
          aria-label={`${name}: ${text}`}
          {...(isWrong && { 'aria-describedby': noteId(part) })}
        >
          {text}
        </Button>
        <Popover className={`popover ${className ?? ''}`} placement="bottom start">
          <Dialog className="editor">
            <Heading slot="title">{name}</Heading>
            <IssueNote issues={issues} />
            {children}
          </Dialog>
        </Popover>
      </DialogTrigger>
      <IssueNote at={part} issues={issues} />
    </>
  );
}
