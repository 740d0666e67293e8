/**
 * Control volumes of a layered part in a row, with nodes of no volume on faces, on layer edges and wherever a probe sits.
 *
 * Cell-centred finite volumes of second order on graded cells. Level l has 2^l times the cells of level 0, cut from the same
 * smooth map of the layer, so that errors fall by four from level to level and can be extrapolated.
 */
import type { Contact, Part } from '../../../solver/model';
import { isSolid } from '../../../solver/model';
import type { Substance } from './substance';

export type Link =
  /** Heat flow = shape × difference of the integrals of conductivity; shape is 1/d, 2π/ln(r2/r1) or 4π r1 r2/(r2 − r1). */
  | { readonly substance: Substance; readonly shape: number }
  /** Heat flow = area × flux across a contact. */
  | { readonly contact: Contact; readonly area: number };

export interface Chain {
  /** One per node: depth, m; volume, m³ per m² or m or one; index of its layer. */
  readonly depth: Float64Array;
  readonly volume: Float64Array;
  readonly layer: Int32Array;
  /** One fewer than nodes: what joins node i and node i + 1. */
  readonly links: readonly Link[];
  readonly substances: readonly Substance[];
  /** Areas of the two faces; 0 where there is none. */
  readonly area: readonly [number, number];
  readonly solid: boolean;
}

/** First cell at an edge of a layer, as a part of what heat reaches in the cycle or of the layer, whichever is less. */
const FIRST = 2.5e-3;
/** Growth of the cells with the distance from the edges. */
const GROWTH = 0.14;
/** At the centre of a solid part nothing happens suddenly. */
const CENTRE = 0.05;

export class Geometry {
  private readonly kind: Part['kind'];
  private readonly inner: number;

  constructor({ kind, innerRadius }: Pick<Part, 'kind' | 'innerRadius'>) {
    this.kind = kind;
    this.inner = innerRadius;
  }

  area(depth: number): number {
    const r = this.inner + depth;
    return this.kind === 'wall' ? 1 : this.kind === 'cylinder' ? 2 * Math.PI * r : 4 * Math.PI * r * r;
  }

  volume(from: number, to: number): number {
    const [a, b] = [this.inner + from, this.inner + to];
    if (this.kind === 'wall') return b - a;
    if (this.kind === 'cylinder') return Math.PI * (b - a) * (b + a);
    return ((4 * Math.PI) / 3) * (b - a) * (b * b + a * b + a * a);
  }

  shape(from: number, to: number): number {
    const [a, b] = [this.inner + from, this.inner + to];
    if (this.kind === 'wall') return 1 / (b - a);
    return this.kind === 'cylinder' ? (2 * Math.PI) / Math.log1p((b - a) / a) : (4 * Math.PI * a * b) / (b - a);
  }
}

/** The row of volumes of a part; `probes` are depths with the index of the layer; `reach`: time heat has to travel, s. */
export function chainOf(
  part: Part,
  substances: readonly Substance[],
  probes: readonly { depth: number; layer: number }[],
  reach: number,
  level: number,
): Chain {
  const geometry = new Geometry(part);
  const solid = isSolid(part);
  const nodes: { depth: number; volume: number; layer: number }[] = [];
  const links: Link[] = [];
  let from = 0;
  part.layers.forEach((layer, index) => {
    const to = from + layer.thickness;
    const substance = substances[index];
    const add = (depth: number, volume: number): void => {
      if (nodes.length > links.length && nodes.length > 0) {
        links.push({ substance, shape: geometry.shape(nodes[nodes.length - 1].depth, depth) });
      }
      nodes.push({ depth, volume, layer: index });
    };
    if (index === 0 ? !solid : part.layers[index - 1].contact !== 0) {
      if (index > 0) links.push({ contact: part.layers[index - 1].contact, area: geometry.area(from) });
      nodes.push({ depth: from, volume: 0, layer: index });
    }
    const marks = probes.filter((probe) => probe.layer === index && probe.depth > from && probe.depth < to);
    const stops = [...new Set([from, ...marks.map(({ depth }) => depth), to])].sort((a, b) => a - b);
    const map = mapOf(layer.thickness, firstCell(substance, layer.thickness, reach), solid && index === 0);
    for (let i = 1; i < stops.length; i++) {
      const edges = edgesOf(map, stops[i - 1] - from, stops[i] - from, level);
      for (let j = 1; j < edges.length; j++) {
        const [a, b] = [from + edges[j - 1], from + edges[j]];
        add(0.5 * (a + b), geometry.volume(a, b));
      }
      add(stops[i], 0);
    }
    from = to;
  });
  return {
    depth: Float64Array.from(nodes, ({ depth }) => depth),
    volume: Float64Array.from(nodes, ({ volume }) => volume),
    layer: Int32Array.from(nodes, ({ layer }) => layer),
    links,
    substances,
    area: [solid ? 0 : geometry.area(0), geometry.area(from)],
    solid,
  };
}

function firstCell(substance: Substance, thickness: number, reach: number): number {
  substance.conductivity.read(20);
  const { capacity } = substance.heatAt(20);
  return FIRST * Math.min(thickness, Math.sqrt((substance.conductivity.value / capacity) * reach));
}

/** Number of cells from the start of a layer up to a place in it, a smooth function of the place. */
type CellMap = (place: number) => number;

/** Cells grow with the distance from both edges: 1/size = 1/(first + g x) + 1/(first + g (L − x)). */
function mapOf(thickness: number, first: number, fromCentre: boolean): CellMap {
  const start = fromCentre ? Math.max(first, CENTRE * thickness) : first;
  return (place) =>
    (Math.log1p((GROWTH * place) / start) - Math.log((first + GROWTH * (thickness - place)) / (first + GROWTH * thickness))) /
    GROWTH;
}

function edgesOf(map: CellMap, from: number, to: number, level: number): number[] {
  const [low, high] = [map(from), map(to)];
  const count = Math.max(3, Math.ceil(high - low)) * 2 ** level;
  const edges = [from];
  for (let i = 1; i < count; i++) {
    const wanted = low + ((high - low) * i) / count;
    let [a, b] = [edges[i - 1], to];
    while (b - a > 1e-13 * to) {
      const middle = 0.5 * (a + b);
      if (map(middle) < wanted) a = middle;
      else b = middle;
    }
    edges.push(0.5 * (a + b));
  }
  edges.push(to);
  return edges;
}
