import { countOf } from '../../lib/format.ts';
import { Button } from './button.tsx';
import { LinkButton } from './link-button.tsx';

export interface ListFooterProps {
  shown: number;
  /** One and many of what is listed: `package`, `packages`. */
  one: string;
  many: string;
  /** Cursor of the next page; null at the end. */
  nextCursor: string | null;
  /** The cursor in force; empty on the first page. */
  cursor: string;
  onCursor: (cursor: string) => void;
  /** Address of the first page, so that it can be opened as a link. */
  firstPage: string;
}

/** Foot of a list that is read page by page; the page stands in the address, and back goes to the one before. */
export function ListFooter({ shown, one, many, nextCursor, cursor, onCursor, firstPage }: ListFooterProps) {
  return (
    <nav aria-label={`Pages of ${many}`} className="no-print mt-2 flex flex-wrap items-center gap-3">
      <span className="text-pencil">
        {countOf(shown, one, many)} on this page{nextCursor === null && cursor === '' ? ', and no more' : ''}
      </span>
      {cursor !== '' && (
        <LinkButton to={firstPage} size="small">
          First page
        </LinkButton>
      )}
      {nextCursor !== null && (
        <Button size="small" onClick={() => onCursor(nextCursor)}>
          Next page
        </Button>
      )}
    </nav>
  );
}
