import type { ApexOptions } from 'apexcharts'
import { formatDay } from '~/shared/utils/days'
import { formatNumber } from '~/shared/utils/units'
import { errorBars, loadLine, readingPoints, timeOf, timeRange, trendBand, trendLine, type MarkChartData } from './markChartSeries'

type ChartSeries = NonNullable<ApexOptions['series']>

export interface ChartColours { paper: string, rule: string, ink: string, graphite: string, slate: string, ochre: string, madder: string }

const font = '"Nunito Sans", system-ui, sans-serif'
/** Both charts keep this much for their numbers, so that the same day stands on one upright line. */
const axisPx = 48

function frame(id: string, heightPx: number, colours: ChartColours, range: { min: number, max: number }): ApexOptions {
  return {
    chart: { id, height: heightPx, fontFamily: font, foreColor: colours.graphite, background: 'transparent', toolbar: { show: false }, zoom: { enabled: false }, animations: { enabled: false }, parentHeightOffset: 0 },
    legend: { show: false },
    grid: { borderColor: colours.rule, padding: { left: 8, right: 12, top: 0, bottom: 0 } },
    tooltip: { enabled: false },
    states: { hover: { filter: { type: 'none' } }, active: { filter: { type: 'none' } } },
    dataLabels: { enabled: false },
    xaxis: { type: 'datetime', min: range.min, max: range.max, axisBorder: { color: colours.ink }, axisTicks: { color: colours.ink }, tooltip: { enabled: false }, labels: { datetimeUTC: true, hideOverlappingLabels: true, datetimeFormatter: { year: 'yyyy', month: 'MMM yy', day: 'd MMM' }, style: { fontSize: '13px' } } },
  }
}

const noteLabel = (text: string, color: string, colours: ChartColours) =>
  ({ text, borderWidth: 0, style: { background: colours.paper, color, fontSize: '13px', fontFamily: font } })

/** Words near an end of the axis stay inside the drawing. */
function anchorAt(x: number, { min, max }: { min: number, max: number }): 'start' | 'middle' | 'end' {
  const share = (x - min) / (max - min)
  return share < 0.25 ? 'start' : share > 0.75 ? 'end' : 'middle'
}

const jumps = ({ readings, suddenOn }: MarkChartData) =>
  readings.filter(({ takenOn }) => takenOn === suddenOn).map(({ takenOn, value }) => ({ x: timeOf(takenOn), y: value }))

/** Readings with their error, the trend with its band, repairs as breaks. */
export function readingsChart(data: MarkChartData, colours: ChartColours, strong: boolean): { options: ApexOptions, series: ChartSeries } {
  const trendColour = strong ? colours.madder : colours.graphite
  const series = [
    { name: 'Range of the trend', type: 'rangeArea', color: trendColour, data: trendBand(data) },
    { name: 'Trend', type: 'line', color: trendColour, data: trendLine(data) },
    { name: 'Uncertainty', type: 'line', color: colours.ink, data: errorBars(data) },
    { name: 'Reading', type: 'line', color: colours.ink, data: readingPoints(data) },
  ].filter(one => one.data.length > 0)
  const each = <T>(pick: (name: string) => T) => series.map(one => pick(one.name))
  const base = frame('mark-readings', 260, colours, timeRange(data))
  const options: ApexOptions = {
    ...base,
    chart: { ...base.chart, type: 'rangeArea' },
    stroke: { curve: 'straight', width: each(name => ({ Trend: 2, Uncertainty: 1.5 })[name] ?? 0) },
    fill: { type: 'solid', opacity: each(name => (name === 'Range of the trend' ? 0.16 : 1)) },
    markers: { size: each(name => (name === 'Reading' ? 5 : 0)), shape: 'square', colors: [colours.paper], strokeColors: colours.ink, strokeWidth: 1.5, hover: { sizeOffset: 0 } },
    xaxis: { ...base.xaxis, labels: { ...base.xaxis?.labels, show: (data.loadSteps ?? []).length === 0 } },
    yaxis: { min: 0, forceNiceScale: true, tickAmount: 4, labels: { minWidth: axisPx, maxWidth: axisPx, style: { fontSize: '13px' }, formatter: value => formatNumber(value, 1) } },
    annotations: {
      xaxis: (data.repairs ?? []).map(repair => ({
        x: timeOf(repair.on), strokeDashArray: 4, borderColor: colours.ochre,
        label: { ...noteLabel(`${repair.label}, ${formatDay(repair.on)}`, colours.ochre, colours), orientation: 'horizontal', textAnchor: anchorAt(timeOf(repair.on), timeRange(data)) },
      })),
      points: jumps(data).map(({ x, y }) => ({
        x, y, marker: { size: 7, fillColor: colours.madder, strokeColor: colours.madder, shape: 'square' },
        label: { ...noteLabel('jumped', colours.madder, colours), textAnchor: anchorAt(x, timeRange(data)), offsetX: -10 },
      })),
    },
  }
  return { options, series: series as ChartSeries }
}

/** The weight above, as steps on the same time axis. */
export function loadChart(data: MarkChartData, colours: ChartColours, weightShown: (lb: number) => number): { options: ApexOptions, series: ChartSeries } {
  const base = frame('mark-load', 130, colours, timeRange(data))
  const points = loadLine(data).map(({ x, y }) => ({ x, y: y === null ? null : weightShown(y) }))
  const options: ApexOptions = {
    ...base,
    chart: { ...base.chart, type: 'line' },
    stroke: { curve: 'stepline', width: 2 },
    markers: { size: 0 },
    yaxis: { min: 0, tickAmount: 2, forceNiceScale: true, labels: { minWidth: axisPx, maxWidth: axisPx, style: { fontSize: '13px' }, formatter: value => formatNumber(value) } },
  }
  return { options, series: [{ name: 'Weight above', color: colours.slate, data: points }] as ChartSeries }
}
