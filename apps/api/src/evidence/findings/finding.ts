import type { Finding } from '@trammel/shared/checks';
import type { Weight } from '@trammel/shared/status';
import type { JudgedRow } from '../row-checks.ts';

type Place = Finding['place'];

const nowhere: Omit<Place, 'kind'> = {
  characteristicId: null,
  balloon: null,
  streamId: null,
  stream: null,
  pieceId: null,
  piece: null,
  elementId: null,
};

export interface Statement {
  readonly rule: string;
  readonly weight: Weight;
  readonly title: string;
  readonly detail: string;
  readonly remedy: string;
}

function at(place: Place, statement: Statement): Finding {
  const key = [
    statement.rule,
    place.kind,
    place.balloon,
    place.stream,
    place.piece,
    place.elementId,
    statement.title,
  ];
  return { key: key.filter((part) => part !== null).join('|'), ...statement, place };
}

export function onPackage(statement: Statement, kind: 'package' | 'warrant' = 'package'): Finding {
  return at({ ...nowhere, kind }, statement);
}

export function onRow(
  row: JudgedRow,
  statement: Statement,
  piece: { id: string; label: string } | null = null,
): Finding {
  return at(
    {
      ...nowhere,
      kind: piece === null ? 'characteristic' : 'reading',
      characteristicId: row.facts.id,
      balloon: row.facts.balloon,
      streamId: row.stream.id,
      stream: row.stream.name,
      pieceId: piece?.id ?? null,
      piece: piece?.label ?? null,
    },
    statement,
  );
}

export function onCharacteristic(facts: { id: string; balloon: string }, statement: Statement): Finding {
  return at(
    { ...nowhere, kind: 'characteristic', characteristicId: facts.id, balloon: facts.balloon },
    statement,
  );
}

export function onElement(element: { id: string }, statement: Statement): Finding {
  return at({ ...nowhere, kind: 'element', elementId: element.id }, statement);
}

export function onStream(stream: { id: string; name: string }, statement: Statement): Finding {
  return at({ ...nowhere, kind: 'stream', streamId: stream.id, stream: stream.name }, statement);
}

export function onPiece(piece: { id: string; label: string }, statement: Statement): Finding {
  return at({ ...nowhere, kind: 'piece', pieceId: piece.id, piece: piece.label }, statement);
}

export function plural(count: number, one: string, many = `${one}s`): string {
  return `${count} ${count === 1 ? one : many}`;
}
