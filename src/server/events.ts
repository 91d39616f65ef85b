import { EventEmitter } from 'node:events';

/** What open browsers are told when a draft changes. */
export interface DraftEvent {
  readonly revision: number;
  readonly action: string;
  readonly label: string;
  readonly actor: { readonly id: string; readonly name: string } | null;
}

const KEY = Symbol.for('driftwright.events');
const ENDING = Symbol('ending');
const holder = globalThis as { [KEY]?: EventEmitter };

/** One emitter a process; a name is a project's id. */
function emitter(): EventEmitter {
  return (holder[KEY] ??= new EventEmitter().setMaxListeners(0));
}

export const publish = (projectId: string, event: DraftEvent): boolean => emitter().emit(projectId, event);

/** Tells every open stream to end: the process is about to. */
export const endStreams = (): boolean => emitter().emit(ENDING);

export function onEnding(listener: () => void): () => void {
  emitter().on(ENDING, listener);
  return () => emitter().off(ENDING, listener);
}

/** @returns the function that ends the subscription */
export function subscribe(projectId: string, listener: (event: DraftEvent) => void): () => void {
  emitter().on(projectId, listener);
  return () => emitter().off(projectId, listener);
}
