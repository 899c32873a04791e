import { Button, Dialog, DialogTrigger, Heading, Input, Popover, TextField } from 'react-aria-components';
import { LabelledField } from '../controls/labelled-field';
import { issueWords } from '../sentence/issue-words';
import { StudySentence } from '../sentence/study-sentence';
import { currentIssues } from '../state/current-issues';
import { useController, useWindowState } from '../state/window-context';
import { ComputeControl } from './compute-control';
import { Explanation } from './explanation';
import { FindingsEditor } from './findings-editor';

/** The head of the window: the study as a sentence, what it takes to compute it, and the button that does. */
export function StudyPanel() {
  const draft = useWindowState((state) => state.draft);
  const check = useWindowState((state) => state.check);
  const controller = useController();
  const issues = currentIssues(check);

  return (
    <section className="studyPanel" aria-label="Study">
      <div className="titleRow">
        <TextField
          className="studyTitle"
          aria-label="Title of the study"
          value={draft.title}
          onChange={(title) => controller.edit((current) => ({ ...current, title }))}
        >
          <Input placeholder="Untitled study" />
        </TextField>
        <DialogTrigger>
          <Button className="quietButton">{draft.notes === '' ? 'Add notes' : 'Notes'}</Button>
          <Popover className="popover wide" placement="bottom start">
            <Dialog className="editor">
              <Heading slot="title">Notes, kept with the study</Heading>
              <LabelledField
                label="Notes"
                isLabelHidden
                lines={10}
                value={draft.notes}
                onChange={(notes) => controller.edit((current) => ({ ...current, notes }))}
              />
            </Dialog>
          </Popover>
        </DialogTrigger>
        <DialogTrigger>
          <Button className="quietButton">Findings wanted</Button>
          <Popover className="popover wide" placement="bottom start">
            <Dialog className="editor">
              <Heading slot="title">Findings wanted besides the usual</Heading>
              <FindingsEditor {...{ draft, issues, onEdit: (change) => controller.edit(change) }} />
            </Dialog>
          </Popover>
        </DialogTrigger>
      </div>
      <div className="sentenceRow">
        <div>
          <StudySentence draft={draft} issues={issues} onEdit={(change) => controller.edit(change)} />
          <Explanation check={check} />
        </div>
        <ComputeControl />
      </div>
      <p className="visuallyHidden" aria-live="polite">
        {issues[0] === undefined
          ? ''
          : `The study cannot be computed. ${issueWords(issues[0])} ${issues[0].remedy}`}
      </p>
    </section>
  );
}
