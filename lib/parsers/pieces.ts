const FIELDS = 3;

/** The pieces that a lexer cuts: kind (see PIECE), start and end of each, in one flat array that grows. */
export class Pieces {
  count = 0;
  private data: Int32Array;

  /** `expected`: how many pieces to make room for. */
  constructor(expected: number) {
    this.data = new Int32Array(FIELDS * Math.ceil(Math.max(16, expected)));
  }

  add(kind: number, start: number, end: number): void {
    const at = this.count * FIELDS;
    if (at === this.data.length) this.grow();
    this.data[at] = kind;
    this.data[at + 1] = start;
    this.data[at + 2] = end;
    this.count++;
  }

  /** Adds a piece that is not empty. */
  put(kind: number, start: number, end: number): void {
    if (end > start) this.add(kind, start, end);
  }

  kind(index: number): number {
    return index < this.count ? (this.data[index * FIELDS] ?? -1) : -1;
  }

  start(index: number): number {
    return this.data[index * FIELDS + 1] ?? 0;
  }

  end(index: number): number {
    return this.data[index * FIELDS + 2] ?? 0;
  }

  clear(): void {
    this.count = 0;
  }

  /** The triples alone, for `Document.pieces`. */
  triples(): Int32Array {
    return this.data.slice(0, this.count * FIELDS);
  }

  private grow(): void {
    const data = new Int32Array(this.data.length * 2);
    data.set(this.data);
    this.data = data;
  }
}
