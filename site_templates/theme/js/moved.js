// An earlier address: go on to the present one, the anchor kept.
(() => {
  const to = document.currentScript.dataset.to;
  location.replace(new URL(to, location.href).href + location.search + location.hash);
})();
