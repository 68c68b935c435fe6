/** The day one year before; 29 February falls back to the 28th. */
export function yearBefore(day: string): string {
  const year = Number(day.slice(0, 4)) - 1;
  const rest = day.slice(4);
  const leap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
  return `${String(year).padStart(4, '0')}${rest === '-02-29' && !leap ? '-02-28' : rest}`;
}
