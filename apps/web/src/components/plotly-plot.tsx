import Plotly from 'plotly.js';
import createPlotlyComponent from 'react-plotly.js/factory';

/** In a file of its own, so that the charting code is fetched only when a chart is shown. */
const PlotlyPlot = createPlotlyComponent(Plotly);
export default PlotlyPlot;
