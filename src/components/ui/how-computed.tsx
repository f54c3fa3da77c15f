import { Link } from 'react-router';
import type { HelpAnchor } from '../../help-anchors';
import { paths } from '../../paths';

type Props = { anchor: HelpAnchor; children?: string };

/** Every figure links to its method. */
export function HowComputed({ anchor, children = 'how is this computed' }: Props) {
  return (
    <Link to={paths.help(anchor)} className="text-sm" data-screen-only>
      {children}
    </Link>
  );
}
