import type { ReactNode } from 'react';
import { ToggleButton, ToggleButtonGroup } from 'react-aria-components';

interface SegmentedProps<K extends string> {
  readonly label: string;
  readonly options: readonly { readonly key: K; readonly text: ReactNode; readonly name?: string }[];
  readonly chosen: K;
  readonly onChoose: (key: K) => void;
}

/** One of a few, all in view. */
export function Segmented<K extends string>({ label, options, chosen, onChoose }: SegmentedProps<K>) {
  return (
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
}
