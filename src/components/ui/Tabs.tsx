/** Tabs on a hairline; the open one is underlined in ink. */
import type { ReactNode } from 'react';
import { Tab, TabList, TabPanel, Tabs as AriaTabs } from 'react-aria-components';

export interface TabItem<K extends string> {
  readonly id: K;
  readonly label: string;
  readonly detail?: string | undefined;
}

interface Props<K extends string> {
  readonly label: string;
  readonly items: readonly TabItem<K>[];
  readonly value: K;
  readonly onChange: (id: K) => void;
  readonly children: ReactNode;
  readonly className?: string;
}

export function Tabs<K extends string>({
  label,
  items,
  value,
  onChange,
  children,
  className = '',
}: Props<K>) {
  return (
    <AriaTabs
      selectedKey={value}
      onSelectionChange={(key) => {
        const item = items.find(({ id }) => id === key);
        if (item) onChange(item.id);
      }}
      className={`flex min-h-0 flex-col ${className}`}
    >
      <TabList aria-label={label} className="border-rule flex gap-4 overflow-x-auto border-b px-3.5">
        {items.map(({ id, label: text, detail }) => (
          <Tab
            key={id}
            id={id}
            className="t-body text-ink-2 hover:text-ink data-[selected]:border-ink data-[selected]:text-ink -mb-px flex min-h-9 cursor-pointer items-center gap-1 border-b-2 border-transparent whitespace-nowrap data-[selected]:font-semibold pointer-coarse:min-h-11"
          >
            {text}
            {detail && <span className="text-ink-2 font-normal">{detail}</span>}
          </Tab>
        ))}
      </TabList>
      <TabPanel id={value} className="min-h-0 grow outline-offset-[-2px]">
        {children}
      </TabPanel>
    </AriaTabs>
  );
}
