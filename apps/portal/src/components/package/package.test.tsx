import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { RouteCardRound } from '@trammel/shared/submissions';
import { stations } from '@trammel/shared/status';
import { expect, it } from 'vitest';
import { renderPage } from '../../testing/render.tsx';
import { RouteCard } from './route-card.tsx';
import { SignaturePair } from './signature-pair.tsx';
import { TitleBlock } from './title-block.tsx';

const round = (number: number, inHand: number, state: RouteCardRound['state']): RouteCardRound => ({
  submissionId: `round-${number}`,
  round: number,
  state,
  stations: stations.map((station, index) => ({
    station,
    state: index < inHand ? 'done' : index === inHand ? 'in-hand' : 'ahead',
    who: index > inHand ? null : index === inHand ? 'Mirela Haddow' : 'Joana Pell',
    at: index < inHand ? '2026-11-10T10:12:00.000Z' : null,
    note: null,
  })),
});

it('names the station in hand and whose hands, and keeps older rounds readable', async () => {
  const user = userEvent.setup();
  renderPage(
    <RouteCard
      rounds={[round(1, 7, 'sent-back'), round(2, 5, 'in-review')]}
      shownId="round-2"
      roundHref={(one) => `/submissions/${one.submissionId}`}
    />,
  );
  const card = screen.getByRole('region', { name: 'Route card' });
  const current = within(card)
    .getAllByRole('listitem')
    .find((item) => item.getAttribute('aria-current') === 'step');
  expect(current).toHaveTextContent('Review, in handwith Mirela Haddow');
  const show = screen.getByRole('button', { name: 'Show the earlier round' });
  expect(show).toHaveAttribute('aria-expanded', 'false');
  await user.click(show);
  expect(screen.getByRole('link', { name: 'Round 1' })).toHaveAttribute('href', '/submissions/round-1');
  expect(within(card).getByText('sent back')).toBeInTheDocument();
});

it('opens the older rounds when one of them is the page', () => {
  renderPage(<RouteCard rounds={[round(2, 5, 'in-review'), round(1, 7, 'sent-back')]} shownId="round-1" />);
  expect(screen.getByRole('button', { name: 'Hide the earlier round' })).toHaveAttribute(
    'aria-expanded',
    'true',
  );
});

it('keeps every cell of the title block in its place, also without a value', () => {
  renderPage(
    <TitleBlock isPageHead partNumber="TD-20417" revision="C" description="Output shaft" level={3} />,
  );
  expect(screen.getByRole('heading', { level: 1 })).toHaveTextContent('TD-20417');
  expect(screen.getAllByRole('term').map((cell) => cell.textContent)).toEqual([
    'Part number',
    'Revision',
    'Description',
    'Request',
    'State',
    'Supplier',
    'Site',
    'Customer',
    'Material',
    'Units',
    'Level',
    'Due',
  ]);
  expect(screen.getAllByText('—')).toHaveLength(8);
});

it('shows both signatures with time, zone, meaning and digest, and says who signs what is unsigned', () => {
  renderPage(
    <SignaturePair
      warrant={{
        unsigned: '',
        signature: {
          name: 'Henrik Sall',
          role: 'Quality manager',
          organisation: 'Quillmark Turning',
          meaning: 'I declare the results are those measured.',
          signedAt: '2026-11-14T10:12:00.000Z',
          digest: 'a3f5c1b2d4e6f708192a3b4c5d6e7f80a3f5c1b2d4e6f708192a3b4c5d6e7f80',
          keyId: 'k1',
        },
      }}
      disposition={{ signature: null, unsigned: 'Mirela Haddow signs when every row is marked.' }}
    />,
  );
  const pair = screen.getByRole('region', { name: 'Signatures' });
  expect(pair).toHaveTextContent('2026-11-14 10:12:00 UTC');
  expect(pair).toHaveTextContent('a3f5c1b2d4e6f708192a3b4c5d6e7f80a3f5c1b2d4e6f708192a3b4c5d6e7f80');
  expect(pair).toHaveTextContent('Mirela Haddow signs when every row is marked.not signed');
});
