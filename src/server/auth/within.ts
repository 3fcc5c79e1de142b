/** Gives `work` up after `limitMs`; what it does later is nobody's concern. @throws DOMException TimeoutError */
export function within<T>(limitMs: number, work: Promise<T>): Promise<T> {
  const signal = AbortSignal.timeout(limitMs);
  const timeOut = new Promise<never>((_, reject) => {
    signal.addEventListener("abort", () => {
      reject(signal.reason as DOMException);
    });
  });
  return Promise.race([work, timeOut]);
}
