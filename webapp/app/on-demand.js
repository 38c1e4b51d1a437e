// A part of the page that is worked out only while it is wanted, and again when what it depends on has changed.
// Knows when to ask; not what it shows.

export function createOnDemand({ isWanted, args, ask, show, fail, isBusy }) {
  let [shown, run] = ['', 0];

  async function refresh() {
    if (!isWanted() || isBusy()) return;
    const given = args();
    const key = JSON.stringify(given);
    if (key === shown) return;
    run += 1;
    const mine = run;
    const settle = (act) => (what) => {
      if (mine !== run) return;
      shown = key;
      act(what);
    };
    await ask(given).then(settle(show), settle((error) => fail(error.message)));
  }

  return { refresh, forget: () => { shown = ''; } }; // after forgetting, what is shown is worked out anew
}
