// Undo and redo by keyboard, outside text fields (which have their own).
window.guideModesPage = (() => {
  let page = null;
  document.addEventListener("keydown", (event) => {
    if (!page || !(event.ctrlKey || event.metaKey) || event.altKey) return;
    if (event.target.closest?.("input:not([type=checkbox]), textarea, [contenteditable]")) return;
    const key = event.key.toLowerCase();
    const action = key === "z" ? (event.shiftKey ? "RedoByKey" : "UndoByKey") : key === "y" ? "RedoByKey" : null;
    if (!action) return;
    event.preventDefault();
    page.invokeMethodAsync(action);
  });
  return {
    listen(reference) { page = reference; },
    leave() { page = null; },
    watch(area, reference) {
      let pause = 0;
      area.addEventListener("input", () => {
        clearTimeout(pause);
        pause = setTimeout(() => reference.invokeMethodAsync("TextChangedAsync"), 150);
      });
      area.focus();
    },
    // Bytes, so that a long text leaves as a stream.
    textOf: (area) => DotNet.createJSStreamReference(new TextEncoder().encode(area.value)),
    show: (id) => document.getElementById(id)?.scrollIntoView({ block: "start" }),
    copyAddress: () => navigator.clipboard.writeText(location.href),
  };
})();
