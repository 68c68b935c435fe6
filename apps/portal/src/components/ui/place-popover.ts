/** Under its anchor, or above where there is no room; set through the style object, which the content policy allows. */
export function placePopover(box: HTMLElement, anchor: DOMRect, side: 'start' | 'end' = 'start'): void {
  const gap = 2;
  const margin = 8;
  const { width, height } = box.getBoundingClientRect();
  const below = anchor.bottom + gap + height <= window.innerHeight;
  const top = below ? anchor.bottom + gap : Math.max(margin, anchor.top - gap - height);
  const wanted = side === 'start' ? anchor.left : anchor.right - width;
  const left = Math.max(margin, Math.min(wanted, window.innerWidth - width - margin));
  box.style.setProperty('top', `${top}px`);
  box.style.setProperty('left', `${left}px`);
}
