/** Texts stored once, numbered in order of first use; number 0 is the empty text. */
export class TextPool {
  readonly values: string[] = [''];
  private readonly index = new Map<string, number>([['', 0]]);
  number(text: string): number {
    let found = this.index.get(text);
    if (found === undefined) {
      found = this.values.length;
      this.values.push(text);
      this.index.set(text, found);
    }
    return found;
  }
}
