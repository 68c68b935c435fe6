import type { ReactNode } from 'react';
import { Link, type To } from 'react-router-dom';
import { buttonLook, type ButtonSize, type ButtonWeight } from './button-look.ts';

interface Look {
  weight?: ButtonWeight;
  size?: ButtonSize;
  className?: string;
  children: ReactNode;
}

/** Goes to another page of the portal. */
export function LinkButton({ to, weight, size, className, children }: Look & { to: To }) {
  return (
    <Link to={to} className={buttonLook(weight, size, className)}>
      {children}
    </Link>
  );
}

/** Fetches a file from the server. */
export function DownloadLink({ href, weight, size, className, children }: Look & { href: string }) {
  return (
    <a href={href} download className={buttonLook(weight, size, className)}>
      {children}
    </a>
  );
}
