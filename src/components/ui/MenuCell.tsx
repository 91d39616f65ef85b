/** A cell of the title block that opens its own list. */
import type { ReactNode } from 'react';
import { Button, Header, Menu, MenuItem, MenuSection, MenuTrigger, Popover } from 'react-aria-components';

export interface Choice {
  readonly id: string;
  readonly label: string;
  readonly detail?: string | undefined;
  /** A link; without it the choice acts. */
  readonly href?: string | undefined;
}

export interface ChoiceGroup {
  readonly title?: string;
  readonly choices: readonly Choice[];
}

interface Props {
  readonly label: string;
  /** What the button shows. */
  readonly children: ReactNode;
  readonly groups: readonly ChoiceGroup[];
  readonly current?: string | undefined;
  readonly onChoose?: (id: string) => void;
  readonly className?: string;
  readonly placement?: 'bottom start' | 'bottom end';
}

export function MenuCell({
  label,
  children,
  groups,
  current,
  onChoose,
  className = '',
  placement = 'bottom start',
}: Props) {
  return (
    <MenuTrigger>
      <Button
        aria-label={label}
        className={`hover:bg-sunk aria-expanded:bg-sunk cursor-pointer text-left ${className}`}
      >
        {children}
      </Button>
      <Popover
        placement={placement}
        offset={0}
        isNonModal
        className="border-frame bg-paper max-h-[70vh] min-w-60 overflow-auto border py-1"
      >
        <Menu
          aria-label={label}
          {...(current === undefined
            ? {}
            : { selectionMode: 'single' as const, selectedKeys: [current], disallowEmptySelection: true })}
          onAction={(key) => onChoose?.(String(key))}
          className="outline-none"
        >
          {groups.map(({ title, choices }, i) => (
            <MenuSection key={title ?? i} aria-label={title ?? label}>
              {title && <Header className="t-label text-ink-3 px-4 pt-2 pb-0.5">{title}</Header>}
              {choices.map(({ id, label: text, detail, href }) => (
                <MenuItem
                  key={id}
                  id={id}
                  textValue={text}
                  {...(href === undefined ? {} : { href })}
                  className="t-body text-ink data-[focused]:bg-sunk flex min-h-7 cursor-pointer items-baseline justify-between gap-6 px-4 py-1 data-[selected]:font-semibold pointer-coarse:min-h-11"
                >
                  <span>{text}</span>
                  {detail && <span className="t-label text-ink-2">{detail}</span>}
                </MenuItem>
              ))}
            </MenuSection>
          ))}
        </Menu>
      </Popover>
    </MenuTrigger>
  );
}

export const Chevron = () => (
  <svg
    width="9"
    height="6"
    viewBox="0 0 9 6"
    fill="none"
    stroke="currentColor"
    aria-hidden="true"
    className="shrink-0"
  >
    <path d="M1 1l3.5 3.5L8 1" />
  </svg>
);
