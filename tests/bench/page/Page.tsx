import { useState } from 'react';
import { LedgerPanel } from '../../../src/features/motion/components/LedgerPanel';
import { Workbench } from '../../../src/features/motion/components/Workbench';
import { complete } from '../../../src/features/motion/scene/defaults';
import { type Scene } from '../../../src/features/motion/scene/scene';
import { fromQuery } from '../../../src/features/motion/store/link';
import { createWorkbench } from '../../../src/features/motion/store/state';

const page = (label: string) => ({ id: label.toLowerCase(), label, href: `#${label}` });

const HEAD = {
  title: 'Closing of the Lantern Sea',
  home: '#',
  pages: ['Overview', 'Workbench', 'Import', 'Team', 'Settings'].map(page),
  version: { value: 'Draft', detail: '14 changes since v7', choices: ['Versions', 'History'].map(page) },
  print: '#print',
  signIn: '#sign-in',
  account: { name: 'Mara Kell', email: 'mara.kell@lantern.example', links: [page('Account')] },
};

export function Page({ scene }: { readonly scene: Scene }) {
  const [store] = useState(() => createWorkbench(complete(scene, fromQuery(window.location.search))));
  return <Workbench head={HEAD} scene={scene} store={store} ledger={<LedgerPanel />} />;
}
