import { redirect, type LoaderFunctionArgs } from 'react-router';
import { ApiError } from '../lib/api';
import { queryClient } from '../lib/query-client';
import { sessionQuery } from '../lib/session';
import { paths } from '../paths';

/** Nobody sees the shell before it is known who they are. */
export async function loadSession({ request }: LoaderFunctionArgs): Promise<null> {
  try {
    await queryClient.query({ ...sessionQuery, staleTime: 'static' });
    return null;
  } catch (error) {
    if (error instanceof ApiError && error.status === 401) {
      const { pathname, search } = new URL(request.url);
      throw redirect(paths.signIn(`${pathname}${search}`));
    }
    throw error;
  }
}
