/** Lines outside the faces: the temperature out there running to the face, or hatching where a face is insulated. */
import { SIDE, type SectionGeometry } from './geometry';
import type { Side } from './sides';

/** Where the line leaves its level, and where it has all but reached the face, px from the face. */
const FAR = 26;
const NEAR = 9;
const HATCH = 8;

/** The level outside a face and its bend to the temperature of the face; empty where the exposure has no temperature. */
export function coursePath(side: Side, faceTemperature: number, geometry: SectionGeometry): string {
  if (side.temperature === null) return '';
  const start = side.face === 'start';
  const [face, sign] = start ? [geometry.left, 1] : [geometry.right, -1];
  const outer = start ? face - SIDE - 2 : face + SIDE + 22;
  const y = geometry.axis.scale.at(side.temperature);
  if (side.kind === 'temperature') return `M${outer} ${y}H${face}`;
  const at = geometry.axis.scale.at(faceTemperature);
  const near = face - sign * NEAR;
  return `M${outer} ${y}H${face - sign * FAR}C${near} ${y} ${near} ${at} ${face} ${at}`;
}

/** Hatching along an insulated face. */
export function insulationPath(side: Side, { left, right, top, bottom }: SectionGeometry): string {
  if (side.kind !== 'insulated') return '';
  const [face, outward] = side.face === 'start' ? [left, -1] : [right, 1];
  const steps = Math.floor((bottom - top) / HATCH);
  return Array.from({ length: steps }, (_, i) => `M${face} ${top + HATCH * i}l${outward * (HATCH - 1)} ${HATCH}`).join('');
}
