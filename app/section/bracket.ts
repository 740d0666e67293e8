/** The difference that a requirement limits, drawn between the two points where it is now. */
import type { Frames, Project } from '../../solver/model';
import { formatQuantity, type UnitSystem } from '../../solver/model/quantities';
import { textWidth, type Box, type Scale } from '../draw';
import { differenceInWords } from '../ui';
import { largestWithin, piecesOf } from './spans';

export interface Bracket {
  /** The arrow between the two heights. */
  path: string;
  /** The dotted level of the hotter point. */
  level: { from: number; to: number; y: number };
  text: string;
  limit: string;
  place: { x: number; y: number; anchor: 'start' | 'end' };
  broken: boolean;
  /** Room it takes, so that read-outs keep clear. */
  boxes: Box[];
}

/** Lower than this there is no room for words, px. */
const LEAST = 44;
/** From the colder point to the arrow, px. */
const BESIDE = 26;

/** The bracket of the first requirement on a difference; null without one, or where it is too small to draw. */
export function bracketOf(
  plan: Project,
  frames: Frames,
  across: ArrayLike<number>,
  profile: ArrayLike<number>,
  scale: Scale,
  system: UnitSystem,
): Bracket | null {
  const asked = plan.requirements.find(({ of }) => 'difference' in of);
  if (asked === undefined || !('difference' in asked.of) || plan.part.layers.length !== frames.layerStart.length - 1) return null;
  const pieces = asked.of.difference === 'part' ? [0, frames.position_m.length] : piecesOf(frames, plan);
  const { value, hot, cold } = largestWithin(profile, pieces);
  const [top, bottom] = [scale.at(profile[hot]), scale.at(profile[cold])];
  if (bottom - top < LEAST) return null;
  const towards = across[cold] > across[hot] ? 1 : -1;
  const x = across[cold] - towards * BESIDE;
  const text = differenceInWords(value, system);
  const limit = `limit ${formatQuantity(asked.must.limit, 'temperatureDifference', system, { significant: 4 }).text}`;
  const width = Math.max(textWidth(limit), textWidth(text, 13));
  const anchor = towards > 0 ? 'end' : 'start';
  const place = { x: x - towards * 8, y: top + 17, anchor } as const;
  return {
    path: `M${x} ${top + 1}V${bottom - 10}M${x - 4} ${top + 7}l4 -6l4 6M${x - 4} ${bottom - 16}l4 6l4 -6`,
    level: { from: across[hot], to: x + towards * 6, y: top },
    text,
    limit,
    place,
    broken: asked.must.kind === 'staysBelow' && value > asked.must.limit,
    boxes: [
      { x: anchor === 'end' ? place.x - width : place.x, y: top + 4, width, height: 28 },
      { x: x - 4, y: top, width: 8, height: bottom - top - 10 },
    ],
  };
}
