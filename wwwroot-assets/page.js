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
      // The browser's own pasting takes seconds over thousands of lines; setting the text takes none.
      area.addEventListener("paste", (event) => {
        const text = event.clipboardData?.getData("text/plain");
        if (!text) return;
        event.preventDefault();
        area.setRangeText(text, area.selectionStart, area.selectionEnd, "end");
        area.dispatchEvent(new Event("input", { bubbles: true }));
      });
      area.focus();
    },
    // Bytes, so that a long text leaves as a stream.
    textOf: (area) => new TextEncoder().encode(area.value),
    show: (id) => document.getElementById(id)?.scrollIntoView({ block: "start" }),
    copyAddress: () => navigator.clipboard.writeText(location.href),
  };
})();
