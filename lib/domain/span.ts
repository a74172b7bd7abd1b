/**
 * A stretch of a decoded text. `start` and `end` count UTF-16 code units from 0 (`end` exclusive), as
 * JavaScript strings do; `line` and `column` are those of `start`, from 1, for people. Byte offsets are
 * derived on demand (`byteOffset` in lib/parsers/encoding), because only uploads and downloads need them.
 */
export interface Span {
  readonly start: number;
  readonly end: number;
  readonly line: number;
  readonly column: number;
}
