import { useEffect } from 'react';
import { useLocation } from 'react-router';
import { RouteError } from '../../components/ui/error-panel';
import { Page } from '../../components/ui/page';
import { Articles } from '../../features/help/articles';
import { comebackArticles } from '../../features/help/comeback-articles';
import { HelpContents } from '../../features/help/contents';
import { lifeArticles } from '../../features/help/life-articles';
import { machineArticles } from '../../features/help/machine-articles';

export const ErrorBoundary = RouteError;

const CHAPTERS = [
  { title: 'What comes back', articles: comebackArticles },
  { title: 'How long parts last', articles: lifeArticles },
  { title: 'Machines, cascades, records', articles: machineArticles },
];

export function Component() {
  const { hash } = useLocation();
  // The browser looks for the anchor before this page is there, so it is looked for once more.
  useEffect(() => {
    if (hash) document.getElementById(decodeURIComponent(hash.slice(1)))?.scrollIntoView();
  }, [hash]);
  return (
    <Page title="Help">
      <p className="max-w-[46em]">
        What every figure means, how it is computed, and where the method is published. The program does not
        replace the maker’s service manual, local rules or licensed practice. Before hands go near blades,
        belts, fuel or wiring: key out, spark plug lead off, battery negative off, blades blocked, engine
        cool, a lifted machine on stands. An interlock is never worked around to get a job done.
      </p>
      <div className="grid gap-8 desk:grid-cols-[220px_minmax(0,1fr)]">
        <HelpContents chapters={CHAPTERS} />
        <div className="flex min-w-0 flex-col gap-10">
          {CHAPTERS.map(({ title, articles }) => (
            <Articles key={title} title={title} articles={articles} />
          ))}
        </div>
      </div>
    </Page>
  );
}
