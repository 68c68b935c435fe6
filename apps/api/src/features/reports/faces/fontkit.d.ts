declare module 'fontkit' {
  export interface OutlinePoint {
    x: number;
    y: number;
    readonly onCurve: boolean;
    endContour: boolean;
    copy(): OutlinePoint;
  }

  export interface Component {
    readonly glyphID: number;
    readonly dx: number;
    readonly dy: number;
    readonly scaleX: number;
    readonly scaleY: number;
    readonly scale01: number;
    readonly scale10: number;
  }

  export interface DecodedGlyph {
    readonly numberOfContours: number;
    readonly points?: readonly OutlinePoint[];
    readonly components?: readonly Component[];
  }

  export interface Glyph {
    readonly id: number;
    readonly advanceWidth: number;
    /** The glyph as its file holds it, before variation. */
    _decode(): DecodedGlyph | null;
  }

  export interface Movements {
    /** Moves the points of a glyph, the four phantom points at their end included. */
    transformPoints(glyphId: number, points: OutlinePoint[]): void;
  }

  export interface Font {
    readonly unitsPerEm: number;
    readonly ascent: number;
    readonly descent: number;
    readonly capHeight: number;
    readonly xHeight: number;
    readonly characterSet: readonly number[];
    readonly fvar?: { readonly axis: readonly { readonly axisTag: string }[] };
    /** Set before the variation is asked for the first time: the values of the axes in their order. */
    variationCoords: number[] | null;
    readonly _variationProcessor: Movements | null;
    hasGlyphForCodePoint(codePoint: number): boolean;
    glyphForCodePoint(codePoint: number): Glyph;
    getGlyph(glyphId: number): Glyph;
  }

  export function create(bytes: Uint8Array): Font;
}
