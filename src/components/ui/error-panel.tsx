import { Component, type ReactNode } from 'react';
import { QueryErrorResetBoundary } from '@tanstack/react-query';
import { isRouteErrorResponse, useRevalidator, useRouteError } from 'react-router';
import { queryClient } from '../../lib/query-client';
import { ApiError } from '../../lib/api';
import { Button } from './button';
import { Page } from './page';
import { EmptyState } from './states';

type PanelProps = {
  error: unknown;
  onRetry?: () => void;
  /** Off where the page's own title says what happened. */
  isTitled?: boolean;
};

/** What happened, what to do, the number to tell, and another try. */
export function ErrorPanel({ error, onRetry, isTitled = true }: PanelProps) {
  const { title, detail, reference } = describe(error);
  return (
    <div
      role="alert"
      className="max-w-[40rem] rounded-bench border border-rule border-l-4 border-l-oxide bg-sheet p-4"
    >
      {isTitled && <h2 className="mb-1 font-heading">{title}</h2>}
      <p className="text-dim">{detail}</p>
      {reference && (
        <p className="mt-1 text-sm text-dim">
          Reference number: <code className="select-all">{reference}</code>
        </p>
      )}
      {onRetry && (
        <Button className="mt-3" onClick={onRetry}>
          Try again
        </Button>
      )}
    </div>
  );
}

function describe(error: unknown): { title: string; detail: string; reference: string | null } {
  if (error instanceof ApiError) {
    if (error.status === 403) {
      return { title: 'Your role does not include this', detail: error.detail, reference: null };
    }
    if (error.status === 404) {
      return {
        title: 'Not found',
        detail: 'It is not in this shop, or no longer. Look for it in its list.',
        reference: null,
      };
    }
    return { title: error.title, detail: error.detail, reference: error.reference };
  }
  if (isRouteErrorResponse(error) && error.status === 404) {
    return { title: 'No such page', detail: 'The address leads nowhere here.', reference: null };
  }
  return {
    title: 'This page stumbled',
    detail: 'Nothing was changed. Try again; if it happens again, load the page anew.',
    reference: null,
  };
}

/** The error boundary of a route: every page exports it as `ErrorBoundary`. */
export function RouteError() {
  const error = useRouteError();
  const { revalidate } = useRevalidator();
  const { title } = describe(error);
  if (error instanceof ApiError && error.status === 403) {
    // Trying again would only be refused again.
    return (
      <Page title={title}>
        <EmptyState title="What is yours stands in the list of screens.">
          The owner of the shop says who may see what.
        </EmptyState>
      </Page>
    );
  }
  return (
    <Page title={title}>
      <ErrorPanel
        error={error}
        isTitled={false}
        onRetry={() => {
          void queryClient.resetQueries({ predicate: (query) => query.state.status === 'error' });
          void revalidate();
        }}
      />
    </Page>
  );
}

type BoundaryProps = { children: ReactNode; onReset: () => void };

class Boundary extends Component<BoundaryProps, { error: unknown }> {
  override state = { error: null as unknown };
  static getDerivedStateFromError(error: unknown) {
    return { error };
  }
  override render() {
    if (this.state.error === null) return this.props.children;
    return (
      <ErrorPanel
        error={this.state.error}
        onRetry={() => {
          this.props.onReset();
          this.setState({ error: null });
        }}
      />
    );
  }
}

/** Keeps one panel's failure from taking the page with it. */
export function PanelBoundary({ children }: { children: ReactNode }) {
  return (
    <QueryErrorResetBoundary>
      {({ reset }) => <Boundary onReset={reset}>{children}</Boundary>}
    </QueryErrorResetBoundary>
  );
}
