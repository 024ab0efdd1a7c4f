import { complexSystem, solveComplex, type ComplexSystem } from '../numerics/solve-complex.ts';
import { waveTable, type WaveTable, type WaveWire } from '../waves/wave-table.ts';
import type { ImpedanceSeries } from './clamp-response.ts';
import { emptyEndResponse, type EndResponse } from './end-response.ts';

/*
 * An end whose wire changes along its length, such as one under armour rods, or whose clamp moves. The wire from the
 * support outwards is cut at each damper and at each change; in every piece stand four waves, e^{±jkx} and decaying
 * exponentials each told from the edge it decays from, so that none exceeds 1. Beyond the last edge an outgoing and a
 * decaying wave answer a unit incoming one. Time factor exp(+jωt).
 */

/** A piece of wire between two edges, or beyond the last. */
interface Piece {
  readonly fromM: number;
  readonly toM: number;
  readonly waves: WaveTable;
  readonly bendingStiffnessNm2: number;
}

/** An end for the general solver. */
export interface SegmentedEnd {
  readonly clampReflectionRatio: number;
  /** Wire of the span. */
  readonly wire: WaveWire;
  /** Wire from the support to a distance, where it differs. */
  readonly covered: { readonly lengthM: number; readonly wire: WaveWire } | null;
  /** Impedance of the clamp's own motion; null holds it still. */
  readonly support: ImpedanceSeries | null;
  readonly distancesM: Float64Array;
  readonly impedances: readonly ImpedanceSeries[];
}

interface WaveValue {
  re: number;
  im: number;
}

const waveCount = 4;
/** Places nearer than this are one edge. */
const sameEdgeM = 1e-9;
const plainEdgeM = 1;

const at = (values: Float64Array, index: number): number => values[index] as number; // index is always inside

/** Derivative of one of a piece's four waves at x: 0 incoming, 1 outgoing, 2 decaying outwards, 3 decaying inwards. */
function waveValue(piece: Piece, wave: number, place: { index: number; x: number; order: number }): WaveValue {
  const k = at(piece.waves.waveNumbersRadPerM, place.index);
  const kappa = at(piece.waves.decayNumbersPerM, place.index);
  const power = wave < 2 ? k ** place.order : kappa ** place.order;
  if (wave === 2)
    return { re: power * (place.order % 2 === 0 ? 1 : -1) * Math.exp(-kappa * (place.x - piece.fromM)), im: 0 };
  if (wave === 3) return { re: power * Math.exp(kappa * (place.x - piece.toM)), im: 0 };
  const way = wave === 0 ? 1 : -1;
  const phase = way * k * place.x + (way * place.order * Math.PI) / 2;
  return { re: power * Math.cos(phase), im: power * Math.sin(phase) };
}

function addEntry(
  system: ComplexSystem,
  row: number,
  entry: { column: number; value: WaveValue; re: number; im: number },
): void {
  const slot = row * system.sizeCount + entry.column;
  const { value, re, im } = entry;
  system.matrixRe[slot] = at(system.matrixRe, slot) + value.re * re - value.im * im;
  system.matrixIm[slot] = at(system.matrixIm, slot) + value.re * im + value.im * re;
}

/** Pieces of the wire, cut at every damper and at the end of the cover. */
function piecesOf(end: SegmentedEnd, frequenciesHz: Float64Array): Piece[] {
  const changes = [...end.distancesM, ...(end.covered === null ? [] : [end.covered.lengthM])];
  // Beyond the last edge there are two waves only, so a wire without any edge gets one.
  const cuts = changes.length === 0 ? [plainEdgeM] : changes.sort((a, b) => a - b);
  const edges = [0, ...cuts.filter((cut, index) => cut - (cuts[index - 1] ?? -1) > sameEdgeM)];
  const open = waveTable(end.wire, frequenciesHz);
  const under = end.covered === null ? open : waveTable(end.covered.wire, frequenciesHz);
  return edges.map((fromM, index) => {
    const isCovered = end.covered !== null && fromM < end.covered.lengthM - sameEdgeM;
    const wire = isCovered && end.covered !== null ? end.covered.wire : end.wire;
    return {
      fromM,
      toM: edges[index + 1] ?? Infinity,
      waves: isCovered ? under : open,
      bendingStiffnessNm2: wire.bendingStiffnessNm2,
    };
  });
}

/** Conditions at the support: no rotation, and no motion or the support's own force, EI·y‴ = −jωZ·y. */
function setSupport(system: ComplexSystem, piece: Piece, at0: { index: number; drive: WaveValue | null }): void {
  for (let wave = 0; wave < waveCount; wave += 1) {
    const place = { index: at0.index, x: 0 };
    addEntry(system, 0, { column: wave, value: waveValue(piece, wave, { ...place, order: 1 }), re: 1, im: 0 });
    const motion = waveValue(piece, wave, { ...place, order: 0 });
    if (at0.drive === null) {
      addEntry(system, 1, { column: wave, value: motion, re: 1, im: 0 });
      continue;
    }
    const shear = waveValue(piece, wave, { ...place, order: 3 });
    addEntry(system, 1, { column: wave, value: shear, re: piece.bendingStiffnessNm2, im: 0 });
    addEntry(system, 1, { column: wave, value: motion, re: at0.drive.re, im: at0.drive.im });
  }
}

/** Conditions at an edge: y, y′, EI·y″ continuous, and −EI·y‴ + T·y′ jumps by the damper's force jωZ·y. */
function setEdge(
  system: ComplexSystem,
  [inner, outer]: readonly [Piece, Piece],
  edge: { number: number; index: number; drive: WaveValue | null; isLast: boolean },
): void {
  const x = outer.fromM;
  for (let order = 0; order < waveCount; order += 1) {
    const row = 2 + waveCount * edge.number + order;
    const innerScale = order >= 2 ? inner.bendingStiffnessNm2 : 1;
    const outerScale = order >= 2 ? outer.bendingStiffnessNm2 : 1;
    for (let wave = 0; wave < waveCount; wave += 1) {
      const column = waveCount * edge.number + wave;
      const value = waveValue(inner, wave, { index: edge.index, x, order });
      addEntry(system, row, { column, value, re: -innerScale, im: 0 });
      if (order === 3 && edge.drive !== null) {
        const motion = waveValue(inner, wave, { index: edge.index, x, order: 0 });
        addEntry(system, row, { column, value: motion, re: edge.drive.re, im: edge.drive.im });
      }
      const outerValue = waveValue(outer, wave, { index: edge.index, x, order });
      if (!edge.isLast) {
        addEntry(system, row, { column: column + waveCount, value: outerValue, re: outerScale, im: 0 });
      } else if (wave === 0) {
        system.sideRe[row] = -outerScale * outerValue.re;
        system.sideIm[row] = -outerScale * outerValue.im;
      } else if (wave < 3) {
        const place = waveCount * (edge.number + 1) + wave - 1;
        addEntry(system, row, { column: place, value: outerValue, re: outerScale, im: 0 });
      }
    }
  }
}

/** jωZ at one frequency, or null for a place without a damper. */
function driveAt(series: ImpedanceSeries | null | undefined, index: number, w: number): WaveValue | null {
  if (series === null || series === undefined) return null;
  return { re: -w * at(series.im, index), im: w * at(series.re, index) };
}

/** Size of y or y″ of a solved inner piece at x. */
function sizeAt(
  system: ComplexSystem,
  piece: Piece,
  place: { number: number; index: number; x: number; order: number },
): number {
  let re = 0;
  let im = 0;
  for (let wave = 0; wave < waveCount; wave += 1) {
    const value = waveValue(piece, wave, place);
    const column = waveCount * place.number + wave;
    re += value.re * at(system.sideRe, column) - value.im * at(system.sideIm, column);
    im += value.re * at(system.sideIm, column) + value.im * at(system.sideRe, column);
  }
  return Math.hypot(re, im);
}

/**
 * Response of an end with a change of wire or a moving clamp, at each frequency.
 *
 * @param end           wire, cover, support, dampers at rising distances with their impedances [n]
 * @param frequenciesHz f, [n] [Hz]
 * @returns reflection referred to x = 0 of the span's wire, curvatures and motions per antinode amplitude
 * @source closed form: tensioned beam piece by piece, one dense system per frequency
 * @validity as clampResponse; the tension is the same in every piece, curvature at the support in the covered wire
 * @accuracy about 1e-9; the engine's fast solver gives the same where nothing changes, see the tests
 */
export function segmentResponse(end: SegmentedEnd, frequenciesHz: Float64Array): EndResponse {
  const pieces = piecesOf(end, frequenciesHz);
  const response = emptyEndResponse(frequenciesHz.length, end.distancesM.length);
  const edgeCount = pieces.length - 1;
  const system = complexSystem(waveCount * edgeCount + 2);
  const atEdge = pieces.slice(1).map(({ fromM }) => end.distancesM.findIndex((x) => Math.abs(x - fromM) <= sameEdgeM));
  for (let index = 0; index < frequenciesHz.length; index += 1) {
    const w = 2 * Math.PI * at(frequenciesHz, index);
    for (const values of [system.matrixRe, system.matrixIm, system.sideRe, system.sideIm]) values.fill(0);
    setSupport(system, pieces[0] as Piece, { index, drive: driveAt(end.support, index, w) });
    for (let number = 0; number < edgeCount; number += 1) {
      const drive = driveAt(end.impedances[atEdge[number] ?? -1], index, w);
      const pair = [pieces[number], pieces[number + 1]] as [Piece, Piece];
      setEdge(system, pair, { number, index, drive, isLast: number === edgeCount - 1 });
    }
    solveComplex(system);
    storeResponse(response, { end, pieces, system, index });
  }
  return response;
}

function storeResponse(
  response: EndResponse,
  solved: { end: SegmentedEnd; pieces: readonly Piece[]; system: ComplexSystem; index: number },
): void {
  const { end, pieces, system, index } = solved;
  const outgoing = waveCount * (pieces.length - 1);
  const re = at(system.sideRe, outgoing);
  const im = at(system.sideIm, outgoing);
  const size = Math.hypot(re, im);
  if (Number.isNaN(size)) return;
  response.hasData[index] = 1;
  const scale = end.clampReflectionRatio * (size > 1 ? 1 / size : 1);
  response.reflectionRe[index] = re * scale;
  response.reflectionIm[index] = im * scale;
  response.reflectionRatio[index] = Math.min(size, 1) * end.clampReflectionRatio;
  const antinodeRatio = 1 + at(response.reflectionRatio, index);
  const first = pieces[0] as Piece;
  response.clampCurvaturePerM2[index] = sizeAt(system, first, { number: 0, index, x: 0, order: 2 }) / antinodeRatio;
  end.distancesM.forEach((x, damper) => {
    const number = pieces.findIndex((piece) => Math.abs(piece.toM - x) <= sameEdgeM);
    const piece = pieces[number] as Piece;
    const place = { number, index, x };
    const curvatures = response.damperCurvaturePerM2[damper];
    const motions = response.damperMotionRatio[damper];
    if (curvatures !== undefined) curvatures[index] = sizeAt(system, piece, { ...place, order: 2 }) / antinodeRatio;
    if (motions !== undefined) motions[index] = sizeAt(system, piece, { ...place, order: 0 }) / antinodeRatio;
  });
}
