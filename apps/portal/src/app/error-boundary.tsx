import { useQueryErrorResetBoundary } from '@tanstack/react-query';
import { Component, type ErrorInfo, type ReactNode } from 'react';
import { useLocation } from 'react-router-dom';
import { Button } from '../components/ui/button.tsx';
import { Notice } from '../components/ui/notice.tsx';
import { PageHead } from '../components/ui/page-head.tsx';
import { ApiProblem, NetworkFailure, reasonOf } from '../lib/api-problem.ts';
import { NotFound } from './not-found.tsx';

interface CatcherProps {
  children: ReactNode;
  onRetry: () => void;
}

class Catcher extends Component<CatcherProps, { error: unknown }> {
  override state: { error: unknown } = { error: null };

  static getDerivedStateFromError(error: unknown) {
    return { error };
  }

  override componentDidCatch(error: Error, info: ErrorInfo) {
    console.error(error, info.componentStack);
  }

  override render() {
    const { error } = this.state;
    if (error === null) return this.props.children;
    if (error instanceof ApiProblem && error.is('not-found', 'forbidden')) return <NotFound />;
    return (
      <Failed
        error={error}
        onRetry={() => {
          this.props.onRetry();
          this.setState({ error: null });
        }}
      />
    );
  }
}

/** A failure stays in its page: the bar and the other pages go on working. */
export function ErrorBoundary({ children }: { children: ReactNode }) {
  const { pathname } = useLocation();
  const { reset } = useQueryErrorResetBoundary();
  return (
    <Catcher key={pathname} onRetry={reset}>
      {children}
    </Catcher>
  );
}

/** A part of the portal that is no longer on the server: a newer version has been put in place meanwhile. */
function isMissingPart(error: unknown): boolean {
  return error instanceof TypeError && /module|import/i.test(error.message);
}

function Failed({ error, onRetry }: { error: unknown; onRetry: () => void }) {
  if (isMissingPart(error)) {
    return (
      <>
        <PageHead title="This page could not be loaded" />
        <Notice
          tone="attention"
          actions={<Button onClick={() => window.location.reload()}>Load the page again</Button>}
        >
          The connection broke, or a newer version of the portal has been installed meanwhile.
        </Notice>
      </>
    );
  }
  const known = error instanceof ApiProblem || error instanceof NetworkFailure;
  return (
    <>
      <PageHead title="This page could not be shown" />
      <Notice
        tone="failure"
        live
        title={reasonOf(error)}
        actions={
          <>
            <Button onClick={onRetry}>Try again</Button>
            <Button onClick={() => window.location.reload()}>Load the page again</Button>
          </>
        }
      >
        {known
          ? 'What was typed and not yet saved is kept in this browser.'
          : 'The fault is in the portal. What was saved is safe.'}
      </Notice>
    </>
  );
}
