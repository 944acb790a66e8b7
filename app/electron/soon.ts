/** Runs work once after calls have stopped for a while; many calls in a row make one run. */
export function soon(work: () => void, quietMs: number): () => void {
  let timer: NodeJS.Timeout | undefined;
  return () => {
    clearTimeout(timer);
    timer = setTimeout(work, quietMs);
  };
}
