/** One object for each command, shared by its button, its key and its place in a list. */
import { open, select, setView, stepAge, toggleTables, turnTo, zoomBy, zoomTo } from './actions';
import type { Centre } from '../globe/matrix';
import type { WorkbenchStore } from './state';

export interface CommandContext {
  readonly store: WorkbenchStore;
  /** Oldest age of the column. */
  readonly oldest: number;
  /** Where Home turns the globe. */
  readonly home: Centre;
}

export interface Command {
  readonly id: string;
  readonly label: string;
  /** Keys as shown; several mean any of them. */
  readonly keys: readonly string[];
  readonly group: 'age' | 'view' | 'selection' | 'help';
  /** Whether an event is this command's; the caller has ruled out typing in fields. */
  readonly matches: (event: KeyLike) => boolean;
  readonly run: (context: CommandContext, event?: KeyLike) => void;
}

export type KeyLike = Pick<KeyboardEvent, 'key' | 'shiftKey' | 'altKey' | 'ctrlKey' | 'metaKey'>;

const bare = (event: KeyLike): boolean => !event.ctrlKey && !event.metaKey && !event.altKey;
const plain =
  (...keys: string[]) =>
  (event: KeyLike): boolean =>
    bare(event) && keys.includes(event.key);

/** 1 Myr, with Shift 10, with Alt 0.1. */
export const ageStep = (event: KeyLike): number => (event.shiftKey ? 10 : event.altKey ? 0.1 : 1);
const arrow = (event: KeyLike): number => (event.key === 'ArrowUp' ? -1 : event.key === 'ArrowDown' ? 1 : 0);
const upDown = (event: KeyLike): boolean => !event.ctrlKey && !event.metaKey && arrow(event) !== 0;

const ageCommand = (
  id: string,
  label: string,
  keys: string[],
  wants: (event: KeyLike) => boolean,
): Command => ({
  id,
  label,
  keys,
  group: 'age',
  matches: (event) => upDown(event) && wants(event),
  run: ({ store, oldest }, event) => event && stepAge(store, arrow(event) * ageStep(event), oldest),
});

export const COMMANDS = {
  step: ageCommand('step', 'Age by 1 Myr', ['↑', '↓'], (event) => !event.shiftKey && !event.altKey),
  leap: ageCommand('leap', 'Age by 10 Myr', ['Shift ↑', 'Shift ↓'], (event) => event.shiftKey),
  nudge: ageCommand(
    'nudge',
    'Age by 0.1 Myr',
    ['Alt ↑', 'Alt ↓'],
    (event) => event.altKey && !event.shiftKey,
  ),
  jump: {
    id: 'jump',
    label: 'Jump to an age or a block',
    keys: ['/'],
    group: 'age',
    matches: plain('/'),
    run: ({ store }) => open(store, 'jump'),
  },
  zoomIn: {
    id: 'zoom-in',
    label: 'Nearer',
    keys: ['+'],
    group: 'view',
    matches: plain('+', '='),
    run: ({ store }) => zoomBy(store, 1.25),
  },
  zoomOut: {
    id: 'zoom-out',
    label: 'Farther',
    keys: ['−'],
    group: 'view',
    matches: plain('-', '−', '_'),
    run: ({ store }) => zoomBy(store, 0.8),
  },
  home: {
    id: 'home',
    label: 'Whole globe, as the project shows it',
    keys: ['Home'],
    group: 'view',
    matches: plain('Home'),
    run: ({ store, home }) => {
      turnTo(store, home);
      zoomTo(store, 1);
    },
  },
  globe: viewCommand('globe', 'Globe', '1'),
  map: viewCommand('map', 'Map', '2'),
  thenAndNow: viewCommand('then-and-now', 'Then and now', '3'),
  tables: {
    id: 'tables',
    label: 'Charts as tables',
    keys: ['T'],
    group: 'view',
    matches: plain('t', 'T'),
    run: ({ store }) => toggleTables(store),
  },
  ownPoint: {
    id: 'own-point',
    label: 'Back to the block’s own point',
    keys: ['.'],
    group: 'selection',
    matches: plain('.'),
    run: ({ store }) => select(store, store.getState().block),
  },
  keys: {
    id: 'keys',
    label: 'These keys',
    keys: ['?'],
    group: 'help',
    matches: plain('?'),
    run: ({ store }) => open(store, 'keys'),
  },
} satisfies Record<string, Command>;

function viewCommand(view: 'globe' | 'map' | 'then-and-now', label: string, key: string): Command {
  return {
    id: view,
    label,
    keys: [key],
    group: 'view',
    matches: plain(key),
    run: ({ store }) => setView(store, view),
  };
}

export const ALL_COMMANDS: readonly Command[] = Object.values(COMMANDS);

/** Runs the command of a key pressed anywhere but in a field; true where there was one. */
export function runKey(event: KeyLike, context: CommandContext): boolean {
  const command = ALL_COMMANDS.find(({ matches }) => matches(event));
  command?.run(context, event);
  return command !== undefined;
}
