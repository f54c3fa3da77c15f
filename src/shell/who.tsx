import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router';
import { ROLE_NAMES } from '../../shared/roles';
import type { Session } from '../../shared/session';
import { Button } from '../components/ui/button';
import { Select } from '../components/ui/select';
import { notify } from '../components/ui/toast-store';
import { apiSend } from '../lib/api';
import { sessionQuery, useSession } from '../lib/session';
import { paths } from '../paths';

/** Which shop, which person, in which role; another shop; out. */
export function Who() {
  const { user, shop, shops } = useSession();
  const client = useQueryClient();
  const navigate = useNavigate();
  const signOut = useMutation({
    mutationFn: () => apiSend('DELETE', '/session'),
    onSuccess: async () => {
      await navigate(paths.signIn());
      client.clear();
    },
    onError: (error) => notify(error.message, 'failed'),
  });
  const goTo = useMutation({
    mutationFn: (shopId: string) => apiSend<Session>('PATCH', '/session', { shopId }),
    onSuccess: async (session) => {
      client.clear();
      client.setQueryData(sessionQuery.queryKey, session);
      await navigate(paths.month());
    },
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
