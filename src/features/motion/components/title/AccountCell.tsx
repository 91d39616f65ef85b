/** Initials that open account, theme and sign-out; for a visitor, the way in and the theme. */
import { MenuCell } from '../../../../components/ui/MenuCell';
import { initials } from '../../names';
import { otherTheme, setTheme, useTheme } from '../../theme';
import type { Account } from './head';

const ROUND =
  'flex size-7 items-center justify-center rounded-full border border-ink text-center text-[11.5px] font-medium max-md:size-11';

interface Props {
  readonly account: Account | null;
  readonly signIn: string;
}

export function AccountCell({ account, signIn }: Props) {
  const theme = useTheme();
  const other = otherTheme(theme);
  const look = { id: 'theme', label: other === 'dark' ? 'Night desk' : 'Light paper' };
  const links = account?.links ?? [{ id: 'sign-in', label: 'Sign in', href: signIn }];
  return (
    <MenuCell
      label={account ? `${initials(account.name)}, account of ${account.name}` : 'Sign in, and the theme'}
      groups={[
        { ...(account ? { title: `${account.name}, ${account.email}` } : {}), choices: [...links, look] },
      ]}
      onChoose={(id) => {
        if (id === 'theme') setTheme(other);
        if (id === 'sign-out') signOut();
      }}
      placement="bottom end"
      className={account ? ROUND : 'button'}
    >
      {account ? initials(account.name) : 'Sign in'}
    </MenuCell>
  );
}

/** A form post, so that the answer's redirect is followed as from a page without scripts. */
function signOut(): void {
  const form = document.createElement('form');
  form.method = 'post';
  form.action = '/api/auth/sign-out';
  document.body.append(form);
  form.submit();
}
