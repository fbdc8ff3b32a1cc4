/**
 * Shares the cost of a durable commit: while one flush is in flight the next batch gathers, and no timer runs.
 *
 * `flush` receives the items in the order they came and answers each in the same order. When it throws, every item of
 * that batch fails with the error and the next batch goes on.
 */
export class GroupCommit<Item, Receipt> {
  private waiting: { item: Item; resolve: (receipt: Receipt) => void; reject: (error: unknown) => void }[] =
    []
  private flushing = false

  constructor(
    private readonly flush: (items: Item[]) => Promise<Receipt[]>,
    private readonly largestBatch: number,
  ) {}

  /** Resolves once the batch that holds the item is committed. */
  commit(item: Item): Promise<Receipt> {
    return new Promise((resolve, reject) => {
      this.waiting.push({ item, resolve, reject })
      if (!this.flushing) {
        this.flushing = true
        // One turn of the event loop later, so that what arrives together is committed together.
        setImmediate(() => this.drain())
      }
    })
  }

  private async drain(): Promise<void> {
    while (this.waiting.length > 0) {
      const batch = this.waiting.splice(0, this.largestBatch)
      try {
        const receipts = await this.flush(batch.map(({ item }) => item))
        batch.forEach(({ resolve }, index) => {
          resolve(receipts[index] as Receipt)
        })
      } catch (error) {
        for (const { reject } of batch) reject(error)
      }
    }
    this.flushing = false
  }
}
