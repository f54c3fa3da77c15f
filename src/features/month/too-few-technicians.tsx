import { Link } from 'react-router';
import { Finding } from '../../components/ui/finding';
import { Page } from '../../components/ui/page';
import { Sheet } from '../../components/ui/sheet';
import { paths } from '../../paths';

/** In a shop of few, the shop's rate less one's own is somebody else's: a technician sees their own alone. */
export function TooFewTechnicians() {
  return (
    <Page
      title="This month"
      finding={
        <Finding>
          With so few technicians the shop’s rate would give away a colleague’s, so it is not shown to you.
        </Finding>
      }
    >
      <Sheet title="What you can see">
        <ul className="flex flex-col gap-2">
          <li>
            <Link to={paths.comebacks()}>What came back of your own repairs</Link>
          </li>
          <li>
            <Link to={paths.parts()}>How long parts last</Link>
          </li>
          <li>
            <Link to={paths.cascades()}>What takes what with it</Link>
          </li>
        </ul>
      </Sheet>
    </Page>
  );
}
