import { useSuspenseQuery } from '@tanstack/react-query';
import type { SubmissionResponse } from '@trammel/shared/submissions';
import type { ReactNode } from 'react';
import { NavLink, useParams } from 'react-router-dom';
import { RouteCard } from '../../../components/package/route-card.tsx';
import { TitleBlock } from '../../../components/package/title-block.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { PackageStateBadge } from '../../../components/ui/state-badge.tsx';
import { DueDay } from '../../../components/ui/time.tsx';
import { submissionQuery } from '../../../features/submissions/api.ts';
import { cn } from '../../../lib/cn.ts';
import { paths } from '../../../lib/paths.ts';
import { packageTabs } from './package-tabs.ts';

/** Head of every page of a package: title block, route card, and the parts of the package as links. */
export function PackageFrame({ children }: { children: (submission: SubmissionResponse) => ReactNode }) {
  const { submissionId = '' } = useParams();
  const { data: submission } = useSuspenseQuery(submissionQuery(submissionId));
  const newest = submission.routeCard.at(-1);
  const settled = submission.submittedAt !== null || submission.state === 'withdrawn';
  return (
    <div className="flex flex-col gap-4">
      <title>{`${submission.part.number} rev ${submission.revision.code} · Trammel`}</title>
      <TitleBlock
        isPageHead
        partNumber={submission.part.number}
        revision={submission.revision.code}
        description={submission.part.name}
        material={submission.part.material}
        customer={submission.customer.name}
        supplier={submission.supplier.name}
        site={submission.site}
        units={submission.unitSystem}
        level={submission.level}
        request={submission.requestNumber}
        due={<DueDay on={submission.dueOn} settled={settled} />}
        state={<PackageStateBadge state={submission.state} />}
      />
      <RouteCard
        rounds={submission.routeCard}
        shownId={submission.id}
        roundHref={(round) => paths.submission(round.submissionId)}
      />
      {newest && newest.submissionId !== submission.id && (
        <Notice tone="attention" title={`This is round ${submission.round}, kept as it was`}>
          Round {newest.round} is the newest; open it from the route card.
        </Notice>
      )}
      {submission.revision.superseded && !submission.decidedAt && (
        <Notice
          tone="attention"
          title={`Revision ${submission.revision.code} is superseded by a newer drawing`}
        >
          Nothing measured here counts for the newer one. Agree in the request's thread whether to go on with
          this revision or to start again on the new one.
        </Notice>
      )}
      <PackageTabs submission={submission} />
      <div>{children(submission)}</div>
    </div>
  );
}

function PackageTabs({ submission }: { submission: SubmissionResponse }) {
  const shown = packageTabs.filter((tab) => tab.shows?.(submission) ?? true);
  return (
    <nav
      aria-label="Parts of the package"
      className="no-print flex gap-1 overflow-x-auto border-b border-rule"
    >
      {shown.map((tab) => (
        <NavLink
          key={tab.label}
          end
          to={tab.path(submission.id)}
          className={({ isActive }) =>
            cn(
              '-mb-px flex min-h-9 items-center border-b-3 px-3 whitespace-nowrap no-underline -outline-offset-2 pointer-coarse:min-h-11',
              isActive
                ? 'border-marking font-semibold text-graphite'
                : 'border-transparent text-pencil hover:text-graphite',
            )
          }
        >
          {tab.label}
          {tab.count && tab.count(submission) > 0 && (
            <span className="figures ml-1.5 text-pencil">{tab.count(submission)}</span>
          )}
        </NavLink>
      ))}
    </nav>
  );
}
