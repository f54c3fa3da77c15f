import { RouteError } from '../../components/ui/error-panel';
import { Page } from '../../components/ui/page';

export const ErrorBoundary = RouteError;

export function Component() {
  return <Page title="Model" />;
}
