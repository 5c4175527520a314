/** Lets at most `atOnce` through at a time, in the order they came. */
export function createGate(atOnce: number) {
  let free = atOnce;
  const line: (() => void)[] = [];

  function leave(): void {
    const first = line.shift();
    if (first) first();
    else free += 1;
  }

  async function enter(): Promise<void> {
    if (free > 0) {
      free -= 1;
      return;
    }
    await new Promise<void>((resolve) => line.push(resolve));
  }

  return {
    /** Runs `work` when there is room. */
    async through<T>(work: () => Promise<T>): Promise<T> {
      await enter();
      try {
        return await work();
      } finally {
        leave();
      }
    },
  };
}
