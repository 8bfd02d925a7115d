const signals = ['SIGINT', 'SIGTERM', 'SIGHUP'] as const;

/**
 * Does a short piece of work to its end although the process is told to stop meanwhile, and stops afterwards. Everywhere else signals keep
 * their plain effect: listeners would be called only when the event loop turns, hence not before a long computation is over.
 */
export async function uninterrupted(work: () => void): Promise<void> {
  let received: NodeJS.Signals | undefined;
  const note = (signal: NodeJS.Signals): void => {
    received = signal;
  };
  for (const signal of signals) process.on(signal, note);
  try {
    work();
  } finally {
    // What has arrived meanwhile is delivered in the next turn of the event loop.
    await new Promise((resolve) => setImmediate(resolve));
    for (const signal of signals) process.off(signal, note);
    if (received) process.kill(process.pid, received);
  }
}
