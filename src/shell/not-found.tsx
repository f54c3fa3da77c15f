import { Link } from 'react-router';
import { Page } from '../components/ui/page';
import { EmptyState } from '../components/ui/states';
import { paths } from '../paths';

export function NotFound() {
  return (
    <Page title="No such page">
      <EmptyState
        title="This address leads nowhere here."
        action={<Link to={paths.month()}>Go to this month</Link>}
      >
        The link may be old, or mistyped.
      </EmptyState>
    </Page>
  );
}
