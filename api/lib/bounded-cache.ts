/**
 * Answers that are kept while they are wanted: at most `size` of them, the one not asked for longest goes first. Whoever asks
 * while an answer is being made waits for the same one; a failed one is not kept.
 */
export class BoundedCache<V> {
  private readonly kept = new Map<string, Promise<V>>();

  constructor(private readonly size: number) {}

  get(key: string, make: () => Promise<V>): Promise<V> {
    const found = this.kept.get(key);
    if (found) {
      this.kept.delete(key);
      this.kept.set(key, found);
      return found;
    }
    const made = make();
    this.kept.set(key, made);
    made.catch(() => {
      if (this.kept.get(key) === made) this.kept.delete(key);
    });
    for (const oldest of this.kept.keys()) {
      if (this.kept.size <= this.size) break;
      this.kept.delete(oldest);
    }
    return made;
  }
}
