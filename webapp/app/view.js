// What the reader has chosen to look at: the target that is followed, and whatever else changes figures but never the plan.
// Holds it, tells who watches; the core gets it with every request.

export function createView() {
  const watchers = [];
  const view = {};
  return {
    now: view,
    watch: (watcher) => watchers.push(watcher),
    // What an opened link chooses: the answer that brings it is already of it.
    adopt: (chosen) => Object.assign(view, chosen),
    // A choice of null is none. Nothing is told where nothing changes.
    choose(name, value) {
      if (JSON.stringify(view[name] ?? null) === JSON.stringify(value ?? null)) return;
      const before = view[name] ?? null;
      view[name] = value ?? null;
      watchers.forEach((watch) => watch(name, before));
    },
  };
}
