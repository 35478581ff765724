// Applies the chosen theme before first paint. Kept apart from the application so that it runs at once.
(() => {
  const themes = ["plate", "dome", "dark-adapted", "amber"];
  let theme = null;
  try {
    theme = localStorage.getItem("shortlight.theme");
  } catch {
    // Storage may be forbidden; then the system's preference decides.
  }
  if (!themes.includes(theme)) theme = matchMedia("(prefers-color-scheme: dark)").matches ? "dome" : "plate";
  document.documentElement.dataset.theme = theme;
})();
