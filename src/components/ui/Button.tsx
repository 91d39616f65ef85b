import { Button as AriaButton, type ButtonProps } from 'react-aria-components';

interface Props extends Omit<ButtonProps, 'className'> {
  /** One main button a screen. */
  readonly main?: boolean;
  readonly quiet?: boolean;
  readonly className?: string;
}

export function Button({ main = false, quiet = false, className = '', ...props }: Props) {
  return (
    <AriaButton
      {...props}
      className={`button ${main ? 'button-main' : ''} ${quiet ? 'button-quiet' : ''} data-[disabled]:text-ink-3 data-[disabled]:border-dashed ${className}`}
    />
  );
}
