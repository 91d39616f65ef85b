/** A labelled field that says what is wrong below itself. */
import {
  FieldError,
  Input,
  Label,
  Text,
  TextField as AriaTextField,
  type TextFieldProps,
} from 'react-aria-components';

interface Props extends Omit<TextFieldProps, 'className' | 'children'> {
  readonly label: string;
  readonly hint?: string | undefined;
  readonly wrong?: string | undefined;
  readonly placeholder?: string;
}

export function TextField({ label, hint, wrong, placeholder, ...props }: Props) {
  return (
    <AriaTextField {...props} isInvalid={wrong !== undefined} className="field">
      <Label className="label">{label}</Label>
      <Input className="input" placeholder={placeholder} />
      {hint && (
        <Text slot="description" className="hint">
          {hint}
        </Text>
      )}
      {wrong && <FieldError className="wrong">{wrong}</FieldError>}
    </AriaTextField>
  );
}
