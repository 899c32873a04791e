import { Input, Label, TextArea, TextField } from 'react-aria-components';

interface LabelledFieldProps {
  readonly label: string;
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly isWrong?: boolean;
  readonly describedBy?: string | undefined;
  readonly isLabelHidden?: boolean;
  readonly lines?: number;
  readonly placeholder?: string;
  readonly className?: string;
}

/** A line or a block of text that keeps whatever is typed. */
export function LabelledField(props: LabelledFieldProps) {
  const { label, value, onChange, isWrong = false, describedBy, lines, placeholder } = props;
  const hint = placeholder === undefined ? {} : { placeholder };
  return (
    <TextField
      className={`field ${props.className ?? ''}`}
      value={value}
      onChange={onChange}
      isInvalid={isWrong}
      {...(describedBy !== undefined && { 'aria-describedby': describedBy })}
      {...(props.isLabelHidden && { 'aria-label': label })}
    >
      {props.isLabelHidden ? null : <Label>{label}</Label>}
      {lines === undefined ? (
        <Input {...hint} spellCheck={false} autoComplete="off" />
      ) : (
        <TextArea {...hint} rows={lines} spellCheck={false} />
      )}
    </TextField>
  );
}
