import type { ReactNode } from 'react';
import { Checkbox } from 'react-aria-components';

interface CheckProps {
  readonly children: ReactNode;
  readonly isChecked: boolean;
  readonly onChange: (isChecked: boolean) => void;
  readonly name?: string;
}

export function Check({ children, isChecked, onChange, name }: CheckProps) {
  return (
    <Checkbox
      className="check"
      isSelected={isChecked}
      onChange={onChange}
      {...(name !== undefined && { 'aria-label': name })}
    >
      <span aria-hidden="true" className="checkBox" />
      <span>{children}</span>
    </Checkbox>
  );
}
