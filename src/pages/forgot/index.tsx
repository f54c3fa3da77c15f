import { RouteError } from '../../components/ui/error-panel';
import { Door } from '../../features/account/door';
import { ForgotForm } from '../../features/account/forgot-form';

export const ErrorBoundary = RouteError;

export function Component() {
  return (
    <Door title="Forgot the password" intro="You get a link by e-mail to set a new one.">
      <ForgotForm />
    </Door>
  );
}
