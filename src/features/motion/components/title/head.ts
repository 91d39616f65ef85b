/** What the title block needs besides the workbench itself; plain data, made on the server. */
import type { Choice } from '../../../../components/ui/MenuCell';

export interface Account {
  readonly name: string;
  readonly email: string;
  readonly links: readonly Choice[];
}

export interface Head {
  readonly title: string;
  readonly home: string;
  readonly pages: readonly Choice[];
  readonly version: { readonly value: string; readonly detail: string; readonly choices: readonly Choice[] };
  /** The version that is shown. */
  readonly shown: 'draft' | number;
  /** A released version: its title block is sunk over a double rule. */
  readonly frozen: boolean;
  readonly print: string;
  readonly signIn: string;
  /** null for a visitor. */
  readonly account: Account | null;
}
