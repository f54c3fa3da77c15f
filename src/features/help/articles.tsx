import type { HelpArticle } from './article';

type Props = { title: string; articles: readonly HelpArticle[] };

/** A chapter of Help; every article can be linked to by its anchor. */
export function Articles({ title, articles }: Props) {
  return (
    <section aria-label={title} className="flex flex-col gap-7">
      <h2 className="text-title font-heading">{title}</h2>
      {articles.map((article) => (
        <article key={article.anchor} className="max-w-[46em]">
          <h3 id={article.anchor} className="scroll-mt-6 font-heading">
            {article.title}
          </h3>
          {article.body.map((paragraph) => (
            <p key={paragraph} className="mt-2">
              {paragraph}
            </p>
          ))}
          {article.formula && (
            <p className="mt-2 border-l-2 border-rule pl-3 text-table text-dim">
              <span className="font-label">Computed as:</span> {article.formula}
            </p>
          )}
          {article.sources && <Sources sources={article.sources} />}
        </article>
      ))}
    </section>
  );
}

function Sources({ sources }: { sources: readonly string[] }) {
  return (
    <ul aria-label="Sources" className="mt-2 list-none text-sm text-dim">
      {sources.map((source) => (
        <li key={source}>{source}</li>
      ))}
    </ul>
  );
}
