import { useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router';
import { ROLE_NAMES } from '../../../shared/roles';
import { Button } from '../../components/ui/button';
import { DataTable, type Column } from '../../components/ui/data-table';
import { Segmented } from '../../components/ui/segmented';
import { Sheet } from '../../components/ui/sheet';
import { useFormats, useSession } from '../../lib/session';
import { chooseTheme, storedTheme, type Theme } from '../../lib/theme';
import { useChange } from '../../lib/use-change';
import { paths } from '../../paths';
import { deviceOf } from './device';
import { signedInQuery, signOutEverywhere, signOutThere, type SignedIn } from './queries';

const THEME_CHOICES = [
  { value: 'system', label: 'As the device' },
  { value: 'light', label: 'Light' },
  { value: 'dark', label: 'Dark' },
] as const;

/** One's own: who, how it looks, where one is signed in. */
export function You() {
  const { user, shop } = useSession();
  const [theme, setTheme] = useState<Theme>(storedTheme);
  return (
    <>
      <Sheet title={user.displayName} sub={`${user.email}, ${ROLE_NAMES[shop.role]} of ${shop.name}`}>
        <Segmented
          label="Appearance"
          value={theme}
          options={THEME_CHOICES}
          onChange={(next) => {
            chooseTheme(next);
            setTheme(next);
          }}
        />
        <p className="mt-3 text-sm">
          <Link to={paths.forgot()}>Set a new password</Link> with a link by e-mail; it signs you out
          everywhere.
        </p>
      </Sheet>
      <SignedInPlaces />
    </>
  );
}

function SignedInPlaces() {
  const { data } = useSuspenseQuery(signedInQuery);
  const formats = useFormats();
  const out = useChange(signOutThere, { stale: signedInQuery.queryKey, said: 'Signed out there.' });
  const outEverywhere = useChange(async () => {
    await signOutEverywhere();
    location.assign(paths.signIn());
  });
  const columns: Column<SignedIn>[] = [
    {
      id: 'device',
      header: 'Where',
      value: (row) => deviceOf(row.userAgent),
      cell: (row) => `${deviceOf(row.userAgent)}${row.isCurrent ? ' (this one)' : ''}`,
      isRowHeader: true,
    },
    {
      id: 'since',
      header: 'Since',
      value: (row) => row.createdAt,
      cell: (row) => formats.instant(row.createdAt),
    },
    {
      id: 'seen',
      header: 'Last seen',
      value: (row) => row.lastSeenAt,
      cell: (row) => formats.instant(row.lastSeenAt),
    },
    {
      id: 'out',
      header: 'Sign out',
      value: () => null,
      isSortable: false,
      cell: (row) =>
        !row.isCurrent && (
          <Button
            look="text"
            onClick={() => out.mutate(row.id)}
            aria-label={`Sign out ${deviceOf(row.userAgent)}`}
          >
            Sign out
          </Button>
        ),
    },
  ];
  return (
    <Sheet
      title="Signed in"
      actions={
        <Button look="text" isBusy={outEverywhere.isPending} onClick={() => outEverywhere.mutate(undefined)}>
          Sign out everywhere
        </Button>
      }
    >
      <DataTable
        caption="Where you are signed in"
        rows={data.data}
        columns={columns}
        rowId={(row) => row.id}
      />
    </Sheet>
  );
}
