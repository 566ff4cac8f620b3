// Draws profile and field plots with the plotting library. Numbers arrive as one block of doubles; colours are read
// from the page's custom properties, so that both themes are one drawing.
const library = new URL("_content/Plotly.Blazor/plotly-basic-3.7.0.min.js", document.baseURI).href;
let loading = null;
const drawn = new Map();
const views = new Map(); // what a person zoomed to, kept over every later drawing

function plotly() {
  if (window.Plotly) return Promise.resolve(window.Plotly);
  loading ??= new Promise((resolve, reject) => {
    const script = document.createElement("script");
    script.src = library;
    script.onload = () => resolve(window.Plotly);
    script.onerror = () => { loading = null; reject(new Error("The plotting library did not load.")); };
    document.head.append(script);
  });
  return loading;
}

function colours() {
  const style = getComputedStyle(document.documentElement);
  const of = (name) => style.getPropertyValue(name).trim();
  return {
    ink: of("--ink"), soft: of("--ink-soft"), grid: of("--grid"), paper: of("--surface"),
    profile: of("--profile"), fill: of("--profile-fill"), level: of("--level"),
    series: [1, 2, 3, 4, 5, 6].map((i) => of(`--series-${i}`)),
  };
}

function trace(curve, numbers, colour, kind) {
  const x = numbers.subarray(curve.start, curve.start + curve.count);
  const y = numbers.subarray(curve.start + curve.count, curve.start + 2 * curve.count);
  const own = curve.slot >= 0 ? colour.series[curve.slot % colour.series.length] : null;
  const common = { type: "scatter", mode: "lines", x, y, name: curve.name, showlegend: false, hoverlabel: { namelength: -1 } };
  switch (curve.role) {
    case "profile":
      return { ...common, line: { color: colour.profile, width: 2 }, fill: "tozeroy", fillcolor: colour.fill, hovertemplate: "x = %{x:.4f} µm<br>n = %{y:.6f}<extra></extra>" };
    case "level":
      return { ...common, line: { color: own ?? colour.level, width: own ? 1.6 : 1.2, dash: own ? "solid" : "dot" }, text: curve.parts.flatMap((part) => Array(part.count).fill(part.name)), hovertemplate: "%{text}<extra></extra>" };
    default:
      return {
        ...common,
        line: { color: own, width: 1.8 },
        hovertemplate: kind === "field" ? "x = %{x:.4f} µm<br>%{y:.5g}<extra>%{fullData.name}</extra>" : "%{fullData.name}, x = %{x:.4f} µm<extra></extra>",
        showlegend: kind === "field",
      };
  }
}

function axis(title, range, colour, font) {
  return {
    title: { text: title, font: { ...font, size: 13 }, standoff: 10 }, range: [...range], color: colour.ink, gridcolor: colour.grid,
    zerolinecolor: colour.grid, linecolor: colour.soft, tickcolor: colour.soft, ticks: "outside", ticklen: 4, showline: true, mirror: false,
    exponentformat: "power", minexponent: 5,
  };
}

function notes(sheet, font, colour) {
  return sheet.note ? [{ xref: "paper", yref: "paper", x: 1, y: 0, xanchor: "right", yanchor: "bottom", xshift: -4, text: sheet.note, showarrow: false, font: { ...font, size: 11, color: colour.soft } }] : [];
}

function layout(sheet, view, colour, narrow) {
  const font = { family: "Fira Sans, Segoe UI, system-ui, sans-serif", size: 12, color: colour.ink };
  return {
    font, paper_bgcolor: "rgba(0,0,0,0)", plot_bgcolor: "rgba(0,0,0,0)", hovermode: "closest",
    margin: { l: narrow ? 52 : 64, r: narrow ? 14 : 24, t: 10, b: 46 }, dragmode: "zoom",
    xaxis: axis(sheet.xTitle, view?.x ?? sheet.xRange, colour, font), yaxis: axis(sheet.yTitle, view?.y ?? sheet.yRange, colour, font),
    legend: { orientation: "h", y: 1.02, yanchor: "bottom", x: 0 },
    annotations: notes(sheet, font, colour).concat(sheet.labels.map((label) => ({
      x: label.x, y: label.y, text: label.text, showarrow: false, xanchor: "left", yanchor: "bottom", xshift: 2, yshift: -1,
      font: { ...font, size: 11, color: label.slot >= 0 ? colour.series[label.slot % colour.series.length] : colour.soft },
    }))),
  };
}

// An edit is watched on the profile: the fields give it a moment's start.
const profileFirst = () => new Promise((resolve) => setTimeout(resolve, 30));

async function render(id) {
  const held = drawn.get(id);
  const canvas = document.getElementById(id);
  const library = await plotly();
  if (held?.sheet.kind === "field") await profileFirst();
  if (!held || !canvas || held !== drawn.get(id)) return;
  const colour = colours();
  const { sheet, numbers } = held;
  const traces = sheet.curves.map((curve) => trace(curve, numbers, colour, sheet.kind));
  await library.react(canvas, traces, layout(sheet, views.get(id), colour, canvas.clientWidth < 480), { displayModeBar: false, responsive: true, doubleClick: false });
  if (!canvas.dataset.drawings) watch(canvas);
  canvas.dataset.drawings = String(Number(canvas.dataset.drawings ?? 0) + 1);
}

function watch(canvas) {
  canvas.on("plotly_relayout", () => {
    const { xaxis, yaxis } = canvas._fullLayout;
    if (drawn.has(canvas.id)) views.set(canvas.id, { x: [...xaxis.range], y: [...yaxis.range] });
  });
  canvas.on("plotly_doubleclick", () => { zoom(canvas.id, 0); });
}

export function draw(id, sheet, bytes) {
  drawn.set(id, { sheet, numbers: new Float64Array(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength)) });
  return render(id);
}

export function forget(id) {
  drawn.delete(id);
  views.delete(id);
  const canvas = document.getElementById(id);
  if (canvas && window.Plotly) window.Plotly.purge(canvas);
}

// A factor below one zooms in about the middle; zero shows everything again.
export async function zoom(id, factor) {
  const held = drawn.get(id);
  const canvas = document.getElementById(id);
  if (!held || !canvas?._fullLayout) return;
  if (factor === 0) {
    views.delete(id);
    await render(id);
    return;
  }
  const about = ([a, b]) => { const m = (a + b) / 2, h = (b - a) / 2 * factor; return [m - h, m + h]; };
  const { xaxis, yaxis } = canvas._fullLayout;
  await (await plotly()).relayout(canvas, { "xaxis.range": about(xaxis.range), "yaxis.range": about(yaxis.range) });
}

export async function save(id, format, filename) {
  const canvas = document.getElementById(id);
  if (!canvas?._fullLayout) return;
  const library = await plotly();
  const figure = {
    data: canvas.data,
    layout: { ...canvas.layout, xaxis: { ...canvas.layout.xaxis, range: [...canvas._fullLayout.xaxis.range] }, yaxis: { ...canvas.layout.yaxis, range: [...canvas._fullLayout.yaxis.range] }, paper_bgcolor: colours().paper },
  };
  await library.downloadImage(figure, { format, filename, width: 960, height: 600, scale: format === "png" ? 2 : 1 });
}

document.addEventListener("guidemodes-theme", () => drawn.forEach((_, id) => render(id)));
