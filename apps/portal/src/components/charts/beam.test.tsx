import { render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { Beam, type BeamProps } from './beam.tsx';

const boss: BeamProps = {
  name: 'Balloon 4, boss bore',
  limits: { lower: 19, upper: 19.05 },
  nominal: 19.025,
  points: [
    { value: 19.018, verdict: 'in-tolerance', label: '1' },
    { value: 19.054, verdict: 'out-of-tolerance', label: '2' },
    { value: 19.049, verdict: 'undecided', label: '3' },
    { value: null, verdict: 'not-measured', label: '4' },
  ],
  spread: { lower: 18.99, upper: 19.06 },
  guard: 0.004,
  unit: 'mm',
  decimals: 3,
};

const pathsOf = (container: HTMLElement) => [...container.querySelectorAll('path')];

describe('a beam', () => {
  it('says in words what it shows', () => {
    render(<Beam {...boss} />);
    expect(screen.getByRole('img')).toHaveAccessibleName(
      'Balloon 4, boss bore: 4 pieces, 1 in tolerance, 1 out of tolerance (1 above), 1 undecided, 1 not measured. ' +
        'Limits 19.000 to 19.050 mm. Natural spread 18.9900 to 19.0600 mm, wider than the tolerance',
    );
  });

  it('gives each result its own shape', () => {
    const { container } = render(<Beam {...boss} />);
    const shapes = pathsOf(container).map((path) => [path.getAttribute('class'), path.getAttribute('d')]);
    expect(shapes).toMatchSnapshot();
  });

  it('draws three hundred pieces with as few paths as three', () => {
    const points = Array.from({ length: 300 }, (_, index) => ({
      value: 19.01 + index / 10_000,
      verdict: 'in-tolerance' as const,
      label: String(index),
    }));
    const { container } = render(<Beam {...boss} points={points} />);
    expect(pathsOf(container).length).toBeLessThan(8);
  });

  it('counts an attribute in marks, and in numbers when there are many', () => {
    const none = { limits: { lower: null, upper: null }, points: [], unit: '', decimals: 0 };
    const { container, rerender } = render(<Beam {...none} attribute={{ checked: 12, failed: 1 }} />);
    expect(screen.getByRole('img')).toHaveAccessibleName('12 pieces checked, 1 failed');
    expect(pathsOf(container)[0]?.getAttribute('d')?.match(/M/g)).toHaveLength(11);
    rerender(<Beam {...none} attribute={{ checked: 125, failed: 2 }} />);
    expect([...container.querySelectorAll('text')].map((text) => text.textContent)).toEqual(['123', '2']);
  });

  it('can leave the words to its row', () => {
    const { container } = render(<Beam {...boss} decorative />);
    expect(screen.queryByRole('img')).not.toBeInTheDocument();
    expect(container.querySelector('svg')).toHaveAttribute('aria-hidden', 'true');
  });
});
