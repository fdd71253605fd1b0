// What must be cleared away even if this process is stopped half-way: kernels and their folders.
// Actions run once, synchronously, on exit, on an interrupt and on a request to terminate.

const actions = new Set<() => void>();
const signals = ["SIGINT", "SIGTERM"] as const;

/** Runs `action` if the process ends before the returned function is called, which forgets it. */
export function beforeExit(action: () => void): () => void {
  if (actions.size === 0) watch();
  actions.add(action);
  return () => {
    actions.delete(action);
    if (actions.size === 0) unwatch();
  };
}

function watch(): void {
  process.on("exit", runActions);
  for (const signal of signals) process.on(signal, onSignal);
}

function unwatch(): void {
  process.off("exit", runActions);
  for (const signal of signals) process.off(signal, onSignal);
}

// Listening to a signal switches off what it does by itself, so it is sent again once we no longer listen.
function onSignal(signal: NodeJS.Signals): void {
  runActions();
  unwatch();
  if (process.listenerCount(signal) === 0) process.kill(process.pid, signal);
}

function runActions(): void {
  for (const action of actions) action();
  actions.clear();
}
