/** Plotly is large and not needed to show the sentence: it is fetched once, in its own file, when first used. */
export async function loadPlotly() {
  const { default: plotly } = await import('plotly.js-dist');
  return plotly;
}
