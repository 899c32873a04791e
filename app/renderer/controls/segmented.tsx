import type { ReactNode } from 'react';
import { ToggleButton, ToggleButtonGroup } from 'react-aria-components';

interface SegmentedProps<K extends string> {
  readonly label: string;
  readonly options: readonly { readonly key: K; readonly text: ReactNode; readonly name?: string }[];
  readonly chosen: K;
  readonly onChoose: (key: K) => void;
  /** for editors, where fields beside it have labels too */
  readonly isLabelShown?: boolean;
}

/** One of a few, all in view. */
export function Segmented<K extends string>(props: SegmentedProps<K>) {
  const { label, options, chosen, onChoose, isLabelShown = false } = props;
  const choice = (
    <ToggleButtonGroup
      aria-label={label}
      className="segmented"
      selectionMode="single"
      disallowEmptySelection
      selectedKeys={[chosen]}
      onSelectionChange={(keys) => {
        const option = options.find(({ key }) => keys.has(key));
        if (option !== undefined) onChoose(option.key);
      }}
    >
      {options.map(({ key, text, name }) => (
        <ToggleButton key={key} id={key} {...(name !== undefined && { 'aria-label': name })}>
          {text}
        </ToggleButton>
      ))}
    </ToggleButtonGroup>
  );
  if (!isLabelShown) return choice;
  return (
    <div className="labelledSegments">
      <span aria-hidden="true">{label}</span>
      {choice}
    </div>
  );
}
