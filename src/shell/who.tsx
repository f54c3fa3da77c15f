import { useMutation } from '@tanstack/react-query';
import { ROLE_NAMES } from '../../shared/roles';
import type { Session } from '../../shared/session';
import { Button } from '../components/ui/button';
import { Select } from '../components/ui/select';
import { notify } from '../components/ui/toast-store';
import { apiSend } from '../lib/api';
import { useSession } from '../lib/session';
import { paths } from '../paths';

/** Which shop, which person, in which role; another shop; out. */
export function Who() {
  const { user, shop, shops } = useSession();
  // Both leave by loading anew: nothing of the shop or the person stays in memory.
  const signOut = useMutation({
    mutationFn: () => apiSend('DELETE', '/session'),
    onSuccess: () => location.assign(paths.signIn()),
    onError: (error) => notify(error.message, 'failed'),
  });
  const goTo = useMutation({
    mutationFn: (shopId: string) => apiSend<Session>('PATCH', '/session', { shopId }),
    onSuccess: () => location.assign(paths.month()),
    onError: (error) => notify(error.message, 'failed'),
  });
  return (
    <div className="flex flex-col text-sm text-dim">
      {shops.length > 1 ? (
        <Select
          look="picker"
          label="Shop"
          value={shop.id}
          onChange={(shopId) => goTo.mutate(shopId)}
          options={shops.map(({ id, name }) => ({ value: id, label: name }))}
        />
      ) : (
        <span>{shop.name}</span>
      )}
      <span>
        {user.displayName}, {ROLE_NAMES[shop.role]}
      </span>
      <Button
        look="text"
        className="self-start text-sm"
        isBusy={signOut.isPending}
        onClick={() => signOut.mutate()}
      >
        Sign out
      </Button>
    </div>
  );
}
