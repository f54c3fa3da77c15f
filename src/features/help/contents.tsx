import { Link } from 'react-router';
import { paths } from '../../paths';
import type { HelpArticle } from './article';

type Props = { chapters: readonly { title: string; articles: readonly HelpArticle[] }[] };

/** What there is in Help, beside it at a desk, above it on a phone. */
export function HelpContents({ chapters }: Props) {
  return (
    <nav aria-label="In Help" className="text-table desk:sticky desk:top-6 desk:self-start">
      {chapters.map(({ title, articles }) => (
        <div key={title} className="mb-4">
          <p className="font-label text-dim">{title}</p>
          <ul className="list-none">
            {articles.map(({ anchor, title: name }) => (
              <li key={anchor}>
                <Link to={paths.help(anchor)} className="inline-block py-2 desk:py-0.5">
                  {name}
                </Link>
              </li>
            ))}
          </ul>
        </div>
      ))}
    </nav>
  );
}
