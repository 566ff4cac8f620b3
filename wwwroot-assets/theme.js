// Light or dark: the system's choice until a person makes one; set before the first paint.
(() => {
  const key = "guidemodes-colours";
  const system = matchMedia("(prefers-color-scheme: dark)");
  const chosen = () => { try { return localStorage.getItem(key); } catch { return null; } };
  const isDark = () => (chosen() ?? (system.matches ? "dark" : "light")) === "dark";
  const apply = () => {
    document.documentElement.dataset.theme = isDark() ? "dark" : "light";
    document.dispatchEvent(new Event("guidemodes-theme"));
  };
  window.guideModesTheme = {
    isDark,
    choose(dark) {
      try { localStorage.setItem(key, dark ? "dark" : "light"); } catch { /* a private window forgets */ }
      apply();
    },
  };
  system.addEventListener("change", apply);
  apply();
})();
