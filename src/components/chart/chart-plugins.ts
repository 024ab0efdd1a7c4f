import type { Chart, ChartArea, Plugin } from 'chart.js';
import type { ChartModel } from './chart-model.ts';
import { hasDirectLabels } from './chart-model.ts';
import type { ChartPalette } from './chart-palette.ts';
import { withAlpha } from './chart-palette.ts';

const labelFont = '500 12px Roboto, sans-serif';
const labelHeightPx = 14;
const gapHatchPx = 9;

interface Drawing {
  readonly context: CanvasRenderingContext2D;
  readonly area: ChartArea;
  readonly xPixel: (x: number) => number;
  readonly yPixel: (y: number) => number;
}

function drawingOf(chart: Chart): Drawing | null {
  const xScale = chart.scales['x'];
  const yScale = chart.scales['y'];
  if (xScale === undefined || yScale === undefined) return null;
  return {
    context: chart.ctx,
    area: chart.chartArea,
    xPixel: (x) => xScale.getPixelForValue(x),
    yPixel: (y) => yScale.getPixelForValue(y),
  };
}

/** Text that stays readable over lines and fills: a rim of paper, then the letters. */
function drawLabel(drawing: Drawing, text: string, at: { x: number; y: number; ink: string; paper: string }): void {
  const { context } = drawing;
  context.font = labelFont;
  context.textBaseline = 'alphabetic';
  context.lineWidth = 3;
  context.strokeStyle = at.paper;
  context.strokeText(text, at.x, at.y);
  context.fillStyle = at.ink;
  context.fillText(text, at.x, at.y);
}

function drawPaper(chart: Chart, palette: ChartPalette): void {
  chart.ctx.save();
  chart.ctx.fillStyle = palette.paper;
  chart.ctx.fillRect(0, 0, chart.width, chart.height);
  chart.ctx.restore();
}

function drawGaps(drawing: Drawing, model: ChartModel, palette: ChartPalette): void {
  const { context, area } = drawing;
  for (const gap of model.gaps) {
    const left = Math.max(area.left, drawing.xPixel(gap.fromX));
    const right = Math.min(area.right, drawing.xPixel(gap.toX));
    if (right - left < 1) continue;
    context.save();
    context.beginPath();
    context.rect(left, area.top, right - left, area.bottom - area.top);
    context.clip();
    context.strokeStyle = withAlpha(palette.quiet, 0.45);
    context.lineWidth = 1;
    const height = area.bottom - area.top;
    for (let x = left - height; x < right; x += gapHatchPx) {
      context.beginPath();
      context.moveTo(x, area.bottom);
      context.lineTo(x + height, area.top);
      context.stroke();
    }
    context.restore();
    drawGapReason(drawing, gap.reason, { left, right, palette });
  }
}

function drawGapReason(
  drawing: Drawing,
  reason: string,
  place: { left: number; right: number; palette: ChartPalette },
): void {
  const { context, area } = drawing;
  context.save();
  context.font = labelFont;
  const middle = (area.top + area.bottom) / 2;
  const isNarrow = context.measureText(reason).width > place.right - place.left - 8;
  context.translate((place.left + place.right) / 2, middle);
  if (isNarrow) context.rotate(-Math.PI / 2);
  context.textAlign = 'center';
  drawLabel(drawing, reason, { x: 0, y: 4, ink: place.palette.ink, paper: place.palette.paper });
  context.restore();
}

function drawLimitTint(drawing: Drawing, model: ChartModel, palette: ChartPalette): void {
  const { context, area } = drawing;
  for (const limit of model.limits) {
    const y = Math.max(area.top, drawing.yPixel(limit.y));
    if (y >= area.bottom) continue;
    context.save();
    context.fillStyle = withAlpha(palette.limit, 0.07);
    context.fillRect(area.left, area.top, area.right - area.left, y - area.top);
    context.restore();
  }
}

function drawLimitLines(drawing: Drawing, model: ChartModel, palette: ChartPalette): void {
  const { context, area } = drawing;
  const labelled: number[] = [];
  for (const limit of model.limits) {
    const y = drawing.yPixel(limit.y);
    if (y < area.top - 1 || y > area.bottom + 1) continue;
    context.save();
    context.strokeStyle = palette.limit;
    context.lineWidth = 1.5;
    context.beginPath();
    context.moveTo(area.left, y);
    context.lineTo(area.right, y);
    context.stroke();
    // Limits that lie close together have their names at opposite sides.
    const isCrowded = labelled.some((other) => Math.abs(other - y) < 2 * labelHeightPx);
    labelled.push(y);
    context.textAlign = isCrowded ? 'left' : 'right';
    drawLabel(drawing, limit.label, {
      x: isCrowded ? area.left + 6 : area.right - 6,
      y: y - 5 < area.top + labelHeightPx ? y + labelHeightPx : y - 5,
      ink: palette.limit,
      paper: palette.paper,
    });
    context.restore();
  }
}

/** Each line is named above its highest point; names that would overlap move down. */
function drawDirectLabels(drawing: Drawing, model: ChartModel, palette: ChartPalette): void {
  const { context, area } = drawing;
  const taken: { x: number; y: number; width: number }[] = [];
  for (const series of model.series) {
    const highest = series.points.reduce<{ x: number; y: number } | null>((best, { x, y }) => {
      return y !== null && (best === null || y > best.y) ? { x, y } : best;
    }, null);
    if (highest === null) continue;
    context.save();
    context.font = labelFont;
    const width = context.measureText(series.label).width;
    const x = Math.min(Math.max(drawing.xPixel(highest.x) + 6, area.left + 4), area.right - width - 4);
    let y = Math.max(drawing.yPixel(highest.y) - 6, area.top + labelHeightPx);
    while (taken.some((other) => isOverlapping(other, { x, y, width })) && y < area.bottom) y += labelHeightPx;
    taken.push({ x, y, width });
    context.textAlign = 'left';
    drawLabel(drawing, series.label, { x, y, ink: palette.tones[series.tone], paper: palette.paper });
    context.restore();
  }
}

function isOverlapping(
  one: { x: number; y: number; width: number },
  other: { x: number; y: number; width: number },
): boolean {
  const isApartSideways = one.x + one.width < other.x || other.x + other.width < one.x;
  return !isApartSideways && Math.abs(one.y - other.y) < labelHeightPx;
}

/** What the marks are drawn from at the moment of drawing. */
export interface MarksSource {
  readonly model: ChartModel;
  readonly palette: ChartPalette;
}

/**
 * Paper, hatched gaps with their reasons, limits with labels and names of lines, drawn around the curves.
 *
 * @param source asked at every drawing, because Chart.js takes its plugins once and keeps them
 */
export function chartPlugin(source: () => MarksSource | null): Plugin<'line'> {
  const withMarks = (chart: Chart, draw: (drawing: Drawing, marks: MarksSource) => void) => {
    const drawing = drawingOf(chart);
    const marks = source();
    if (drawing !== null && marks !== null) draw(drawing, marks);
  };
  return {
    id: 'stillspan-marks',
    beforeDraw: (chart) => withMarks(chart, (_, { palette }) => drawPaper(chart, palette)),
    beforeDatasetsDraw: (chart) =>
      withMarks(chart, (drawing, { model, palette }) => {
        drawLimitTint(drawing, model, palette);
        drawGaps(drawing, model, palette);
      }),
    afterDatasetsDraw: (chart) =>
      withMarks(chart, (drawing, { model, palette }) => {
        drawLimitLines(drawing, model, palette);
        if (hasDirectLabels(model)) drawDirectLabels(drawing, model, palette);
      }),
  };
}
