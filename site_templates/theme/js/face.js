// Runs before the first paint, so that a chosen face does not flash: paper or blueprint.
(() => {
  const chosen = (() => {
    try {
      return localStorage.getItem("shapeshelf-face");
    } catch {
      return null;
    }
  })();
  if (chosen === "paper" || chosen === "blueprint") {
    document.documentElement.dataset.face = chosen;
  }
})();
