/** Results of asynchronous work by key, the latest few of them; work under way is shared. */
export class Recent<T> {
  private readonly most: number;
  private readonly kept = new Map<number, Promise<T>>();

  constructor(most: number) {
    this.most = most;
  }

  /** The result under `key`; `make` is called where it is not kept. What fails is not kept. */
  get(key: number, make: () => Promise<T>): Promise<T> {
    const known = this.kept.get(key);
    this.kept.delete(key);
    const result = known ?? make();
    this.kept.set(key, result);
    if (!known) result.catch(() => this.kept.delete(key));
    for (const oldest of this.kept.keys()) {
      if (this.kept.size <= this.most) break;
      this.kept.delete(oldest);
    }
    return result;
  }
}
