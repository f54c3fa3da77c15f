import { RouteError } from '../../components/ui/error-panel';
import { Door } from '../../features/account/door';
import { SetPasswordForm } from '../../features/account/set-password-form';

export const ErrorBoundary = RouteError;

export function Component() {
  return (
    <Door title="Set your password">
      <SetPasswordForm />
    </Door>
  );
}
