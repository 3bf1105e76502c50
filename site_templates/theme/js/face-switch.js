// The button that changes between paper (light) and blueprint (dark).

const KEY = "shapeshelf-face";

export function switchFace(button) {
  if (!button) return;
  button.hidden = false;
  describe(button);
  button.addEventListener("click", () => {
    const next = present() === "paper" ? "blueprint" : "paper";
    document.documentElement.dataset.face = next;
    remember(next);
    describe(button);
  });
}

function present() {
  const chosen = document.documentElement.dataset.face;
  if (chosen) return chosen;
  return matchMedia("(prefers-color-scheme: dark)").matches ? "blueprint" : "paper";
}

function describe(button) {
  const label = present() === "paper" ? "Dark face" : "Light face";
  button.querySelector("span").textContent = label;
  button.title = label;
}

function remember(face) {
  try {
    localStorage.setItem(KEY, face);
  } catch {
    // A browser that keeps nothing still changes the page at hand.
  }
}
