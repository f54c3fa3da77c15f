import { redirect, type LoaderFunctionArgs } from 'react-router';
import { RouteError } from '../../components/ui/error-panel';
import { ToastRegion } from '../../components/ui/toast-region';
import { Door } from '../../features/account/door';
import { SignInForm } from '../../features/account/sign-in-form';
import { queryClient } from '../../lib/query-client';
import { sessionQuery } from '../../lib/session';
import { safeNext } from '../../paths';

/** Someone who is signed in already goes on to where they wanted. */
export function loader({ request }: LoaderFunctionArgs) {
  const isSignedIn = queryClient.getQueryData(sessionQuery.queryKey) !== undefined;
  return isSignedIn ? redirect(safeNext(new URL(request.url).searchParams.get('next'))) : null;
}

export const ErrorBoundary = RouteError;

export function Component() {
  return (
    <Door title="Sign in">
      <SignInForm />
      <ToastRegion />
    </Door>
  );
}
