export interface KnownStream {
  readonly id: string;
  readonly name: string;
}

export interface KnownPiece {
  readonly id: string;
  readonly label: string;
  readonly streamId: string;
  readonly slot: number;
}

type Found = {
  readonly id: string | null;
  readonly label: string;
  readonly streamId: string;
  readonly slot: number;
};
type NotFound = { readonly detail: string; readonly remedy: string };

const norm = (text: string): string => text.trim().toLowerCase().replace(/\s+/g, ' ');
const lastNumber = (text: string): string | null =>
  /(\d+)\D*$/.exec(text)?.[1]?.replace(/^0+(?=\d)/, '') ?? null;

/** Finds the piece a label of the file means, by its label, or by its number within a stream. */
export class PieceFinder {
  readonly newPieces: { label: string; streamId: string }[] = [];
  private readonly byLabel = new Map<string, KnownPiece>();
  private readonly added = new Map<string, Found>();

  constructor(
    private readonly known: {
      readonly streams: readonly KnownStream[];
      readonly pieces: readonly KnownPiece[];
      readonly newPiecesStreamId: string | null;
    },
  ) {
    for (const piece of known.pieces) this.byLabel.set(norm(piece.label), piece);
  }

  find(label: string, streamText: string | null): Found | NotFound {
    const stream = streamText === null || streamText === '' ? null : this.streamOf(streamText);
    if (stream !== null && 'detail' in stream) return stream;
    const named = this.byLabel.get(norm(label));
    if (named && (stream === null || named.streamId === stream.id)) return named;
    const home = stream ?? (this.known.streams.length === 1 ? (this.known.streams[0] ?? null) : null);
    if (home !== null) {
      const inHome = this.byNumber(home, label);
      if (inHome) return inHome;
    }
    return this.add(
      label,
      stream?.id ?? this.known.newPiecesStreamId ?? (this.known.streams.length === 1 ? home?.id : undefined),
      stream,
    );
  }

  private streamOf(text: string): KnownStream | NotFound {
    const wanted = norm(text);
    const exact = this.known.streams.find((stream) => norm(stream.name) === wanted);
    if (exact) return exact;
    const number = lastNumber(text);
    const byNumber =
      number === null ? [] : this.known.streams.filter((stream) => lastNumber(stream.name) === number);
    const [only] = byNumber;
    if (only && byNumber.length === 1) return only;
    return {
      detail: `"${text.slice(0, 40)}" is no stream of this package.`,
      remedy: `Write one of: ${this.known.streams.map((stream) => stream.name).join(', ')}.`,
    };
  }

  /** "1", "piece 1", "#1": the piece of that number in its stream. A label of its own is never taken for a number. */
  private byNumber(stream: KnownStream, label: string): KnownPiece | null {
    const number = /^(?:(?:piece|part|sample|teil|stück|pc|no|nr|#)\.?\s*)?(\d{1,4})$/i.exec(
      label.trim(),
    )?.[1];
    if (number === undefined) return null;
    const inStream = this.known.pieces.filter((piece) => piece.streamId === stream.id);
    const plain = number.replace(/^0+(?=\d)/, '');
    const ending = inStream.filter((piece) => lastNumber(piece.label) === plain);
    return (
      (ending.length === 1 ? ending[0] : inStream.find((piece) => piece.slot === Number(plain) - 1)) ?? null
    );
  }

  private add(label: string, streamId: string | undefined, stream: KnownStream | null): Found | NotFound {
    const clean = label.trim().slice(0, 100);
    const key = `${streamId ?? ''} ${norm(clean)}`;
    const before = this.added.get(key);
    if (before) return before;
    if (streamId === undefined) {
      return {
        detail: `Piece "${clean}" is not in the package.`,
        remedy: 'Choose the stream for new pieces above, or add the piece first.',
      };
    }
    // Labels are unique in the package, so a bare number of a stream is told apart by the stream's name.
    const taken =
      this.byLabel.has(norm(clean)) || this.newPieces.some((piece) => norm(piece.label) === norm(clean));
    const unique = taken && stream ? `${stream.name}-${clean}` : clean;
    if (this.byLabel.has(norm(unique)))
      return {
        detail: `Piece "${clean}" belongs to another stream.`,
        remedy: 'Correct the stream, or give the piece a label of its own.',
      };
    const found: Found = { id: null, label: unique, streamId, slot: -1 };
    this.added.set(key, found);
    this.newPieces.push({ label: unique, streamId });
    return found;
  }
}
