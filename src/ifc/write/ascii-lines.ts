/** ASCII lines gathered into pieces of about a megabyte, since one text of a large model would be too long. */
export class AsciiLines {
  private readonly eol: string;
  private readonly done: Uint8Array[] = [];
  private lines: string[] = [];
  private length = 0;

  constructor(eol: string) {
    this.eol = eol;
  }

  line(text: string): void {
    this.lines.push(text);
    this.length += text.length;
    if (this.length > 1 << 20) this.flush();
  }

  pieces(): Uint8Array[] {
    this.flush();
    return this.done;
  }

  private flush(): void {
    if (this.lines.length > 0) this.done.push(encoder.encode(this.lines.join(this.eol) + this.eol));
    this.lines = [];
    this.length = 0;
  }
}

const encoder = new TextEncoder();
