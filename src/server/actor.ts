/** Who makes a request. Rights come from here and from the policy, never from the request itself. */
export interface ActorUser {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly site_role: 'admin' | null;
  readonly is_demo: boolean;
}

export interface Actor {
  /** Null for a visitor. */
  readonly user: ActorUser | null;
  readonly via: 'session' | 'token' | null;
  readonly scope: 'read' | 'write';
}

export const VISITOR: Actor = { user: null, via: null, scope: 'write' };
