import { Button, Label, ListBox, ListBoxItem, Popover, Select } from 'react-aria-components';

interface ChoiceProps<K extends string | number> {
  readonly label: string;
  readonly options: readonly { readonly key: K; readonly text: string }[];
  readonly chosen: K;
  readonly onChoose: (key: K) => void;
}

/** One of several from a list that opens. */
export function Choice<K extends string | number>({ label, options, chosen, onChoose }: ChoiceProps<K>) {
  return (
    <Select
      className="choice"
      value={chosen}
      onChange={(key) => {
        const option = options.find((candidate) => candidate.key === key);
        if (option !== undefined) onChoose(option.key);
      }}
    >
      <Label>{label}</Label>
      <Button>
        <span>{options.find(({ key }) => key === chosen)?.text ?? '–'}</span>
        <span aria-hidden="true" className="chevron" />
      </Button>
      <Popover className="popover listPopover">
        <ListBox className="list" items={options.map(({ key, text }) => ({ id: key, text }))}>
          {({ text }) => <ListBoxItem textValue={text}>{text}</ListBoxItem>}
        </ListBox>
      </Popover>
    </Select>
  );
}
