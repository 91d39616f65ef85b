/** Initials that open account, theme and sign-out; for a visitor, the way in and the theme. */
import { MenuCell } from '../../../../components/ui/MenuCell';
import { initials } from '../../names';
import { otherTheme, setTheme, useTheme } from '../../theme';
import { type Account } from './head';

export function AccountCell({ account }: { readonly account: Account | null }) {
  const theme = useTheme();
  const other = otherTheme(theme);
  const look = { id: 'theme', label: other === 'dark' ? 'Night desk' : 'Light paper' };
  const links = account?.links ?? [];
  return (
    <MenuCell
      label={account ? `Account of ${account.name}` : 'Sign in and appearance'}
      groups={[
        { ...(account ? { title: `${account.name}, ${account.email}` } : {}), choices: [...links, look] },
      ]}
      onChoose={(id) => {
        if (id === 'theme') setTheme(other);
        if (id === 'sign-out') signOut();
      }}
      placement="bottom end"
      className="border-ink flex size-7 items-center justify-center rounded-full border text-center text-[11.5px] font-medium max-md:size-11"
    >
      <span aria-hidden="true">{account ? initials(account.name) : '?'}</span>
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
