/** A map that forgets what was put in first once it is full: for answers that can be computed again. */
export class BoundedMap<K, V> {
  private readonly kept = new Map<K, V>();

  /** @param most entries kept, ≥ 1 */
  constructor(private readonly most: number) {}

  get(key: K): V | undefined {
    return this.kept.get(key);
  }

  set(key: K, value: V): V {
    const [oldest] = this.kept.keys();
    if (oldest !== undefined && this.kept.size >= this.most && !this.kept.has(key)) this.kept.delete(oldest);
    this.kept.set(key, value);
    return value;
  }
}
