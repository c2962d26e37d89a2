/** The distributed bundle brings no types; react-plotly.js takes it as it is. */
declare module 'plotly.js' {
  const Plotly: Record<string, unknown>;
  export default Plotly;
}
