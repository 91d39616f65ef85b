/** The workbench: title block, log beside globe, ledger beside notebook. */
import type { ReactNode } from 'react';
import type { Scene } from '../scene/scene';
import type { WorkbenchStore } from '../store/state';
import { BenchProvider } from './bench';
import { GlobePanel } from './globe/GlobePanel';
import { Keys } from './help/Keys';
import { LogPanel } from './log/LogPanel';
import { SvgPatterns } from './log/SvgPatterns';
import { Notebook } from './notebook/Notebook';
import { PhoneWorkbench } from './PhoneWorkbench';
import { TitleBlock } from './title/TitleBlock';
import type { Head } from './title/head';
import { useKeys } from './use-keys';
import { PHONE, useMedia } from './use-media';

interface Props {
  readonly head: Head;
  readonly scene: Scene;
  readonly store: WorkbenchStore;
  /** The ledger under the log. */
  readonly ledger: ReactNode;
  /** Tools over the globe. */
  readonly tools?: ReactNode;
  /** A line under the title block: loading, offline. */
  readonly notice?: ReactNode;
}

export function Workbench({ head, scene, store, ledger, tools, notice }: Props) {
  return (
    <BenchProvider store={store} scene={scene}>
      <SvgPatterns />
      <Panels head={head} ledger={ledger} tools={tools} notice={notice} />
    </BenchProvider>
  );
}

function Panels({ head, ledger, tools, notice }: Pick<Props, 'head' | 'ledger' | 'tools' | 'notice'>) {
  useKeys();
  const phone = useMedia(PHONE);
  if (phone) return <PhoneWorkbench head={head} notice={notice} />;
  return (
    <div className="relative flex min-h-dvh flex-col xl:h-dvh">
      <TitleBlock head={head} />
      <main
        id="main"
        className="grid min-h-0 grow grid-cols-1 xl:grid-cols-[minmax(0,42fr)_minmax(0,58fr)] xl:grid-rows-[minmax(0,555fr)_minmax(0,293fr)]"
      >
        <h1 className="sr-only">{head.title}: workbench</h1>
        <div className="border-frame relative min-h-0 border-b max-xl:h-[560px] xl:border-r">
          <LogPanel />
        </div>
        <div className="border-frame relative min-h-0 border-b max-xl:h-[600px]">
          <GlobePanel importHref={head.pages.find(({ id }) => id === 'import')?.href} tools={tools} />
          <div className="absolute bottom-2 left-5 max-w-[280px]">{notice}</div>
          <Keys />
        </div>
        <div className="border-frame min-h-0 min-w-0 overflow-hidden max-xl:max-h-[420px] max-xl:border-b xl:border-r">
          {ledger}
        </div>
        <div className="min-h-0">
          <Notebook />
        </div>
      </main>
    </div>
  );
}
