/** Nodes and weights of the 16-point Gauss-Legendre rule, the positive half. */
export const GAUSS_RULE: readonly (readonly [number, number])[] = [
  [0.09501250983763744, 0.1894506104550685],
  [0.2816035507792589, 0.1826034150449236],
  [0.45801677765722737, 0.16915651939500254],
  [0.6178762444026438, 0.14959598881657674],
  [0.755404408355003, 0.12462897125553388],
  [0.8656312023878318, 0.09515851168249279],
  [0.9445750230732326, 0.062253523938647894],
  [0.9894009349916499, 0.02715245941175409],
];

/** Visits the nodes of Gauss's 16-point rule on equal panels of (from, to) with their weights. */
export function integrate(
  from: number,
  to: number,
  panels: number,
  visit: (x: number, weight: number) => void,
): void {
  const half = (to - from) / (2 * panels);
  for (let panel = 0; panel < panels; panel += 1) {
    const middle = from + (2 * panel + 1) * half;
    for (const [node, weight] of GAUSS_RULE) {
      visit(middle - half * node, weight * half);
      visit(middle + half * node, weight * half);
    }
  }
}
