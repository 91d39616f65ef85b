/**
 * Pointer gestures over a globe or map: idle, pointing, dragging, pinching. A press becomes a drag once it has moved;
 * released before that it picks. Escape during a drag puts the view back as it was.
 */
import type { Centre } from './matrix';
import type { XY } from './pen';

export interface GestureHost {
  /** Centre and zoom now. */
  view(): { centre: Centre; zoom: number };
  /** Begins a drag at a point; answers what each later point makes of the centre, or null off the globe. */
  grab(at: XY): ((to: XY) => Centre | null) | null;
  turnTo(centre: Centre): void;
  zoomTo(zoom: number): void;
  pick(at: XY): void;
  hover(at: XY | null): void;
  moving(now: boolean): void;
}

type Snapshot = { readonly centre: Centre; readonly zoom: number };
type State =
  | { readonly name: 'idle' }
  | { readonly name: 'pointing'; readonly id: number; readonly at: XY; readonly before: Snapshot }
  | {
      readonly name: 'dragging';
      readonly id: number;
      readonly follow: (to: XY) => Centre | null;
      readonly before: Snapshot;
    }
  | { readonly name: 'pinching'; readonly span: number; readonly zoom: number; readonly before: Snapshot };

/** CSS pixels a press may move and still pick. */
const SLACK = 4;

export class Gestures {
  private state: State = { name: 'idle' };
  private readonly pointers = new Map<number, XY>();

  constructor(private readonly host: GestureHost) {}

  get busy(): boolean {
    return this.state.name === 'dragging' || this.state.name === 'pinching';
  }

  down(id: number, at: XY): void {
    this.pointers.set(id, at);
    if (this.pointers.size === 2) return this.pinch();
    if (this.state.name === 'idle') this.state = { name: 'pointing', id, at, before: this.host.view() };
  }

  move(id: number, at: XY): void {
    if (this.pointers.has(id)) this.pointers.set(id, at);
    const { state } = this;
    if (state.name === 'idle') return this.host.hover(at);
    if (state.name === 'pinching') {
      const span = this.span();
      if (span > 0) this.host.zoomTo((state.zoom * span) / state.span);
      return;
    }
    if (state.id !== id) return;
    if (state.name === 'pointing') {
      if (Math.hypot(at[0] - state.at[0], at[1] - state.at[1]) < SLACK) return;
      const follow = this.host.grab(state.at);
      if (!follow) return;
      this.state = { name: 'dragging', id, follow, before: state.before };
      this.host.hover(null);
      this.host.moving(true);
    }
    if (this.state.name === 'dragging') {
      const centre = this.state.follow(at);
      if (centre) this.host.turnTo(centre);
    }
  }

  up(id: number, at: XY): void {
    this.pointers.delete(id);
    const { state } = this;
    if (state.name === 'pinching' ? this.pointers.size < 2 : state.name !== 'idle' && state.id === id)
      this.rest();
    if (state.name === 'pointing' && state.id === id) this.host.pick(at);
  }

  leave(): void {
    if (this.state.name === 'idle') this.host.hover(null);
  }

  /** Puts the view back where the gesture began; false where there was none. */
  cancel(): boolean {
    const { state } = this;
    if (state.name === 'idle') return false;
    this.pointers.clear();
    this.host.turnTo(state.before.centre);
    this.host.zoomTo(state.before.zoom);
    this.rest();
    return true;
  }

  private pinch(): void {
    const before = this.state.name === 'idle' ? this.host.view() : this.state.before;
    this.state = { name: 'pinching', span: Math.max(1, this.span()), zoom: this.host.view().zoom, before };
    this.host.moving(true);
  }

  private span(): number {
    const [a, b] = [...this.pointers.values()];
    return a && b ? Math.hypot(a[0] - b[0], a[1] - b[1]) : 0;
  }

  private rest(): void {
    this.state = { name: 'idle' };
    this.host.moving(false);
  }
}
