import { describe, expect, it } from 'vitest';
import { layLayers, linearScale, profileAt, valueAxis } from '../../../app/draw';
import { bracketOf } from '../../../app/section/bracket';
import { captionsOf } from '../../../app/section/captions';
import type { SectionGeometry } from '../../../app/section/geometry';
import { jumpPath, pointsAcross, profilePath, sampleAcross, temperatureIn } from '../../../app/section/profilePath';
import { coursePath, insulationPath } from '../../../app/section/sidePaths';
import { outsideRange, sidesAt } from '../../../app/section/sides';
import { largestWithin, piecesOf } from '../../../app/section/spans';
import { stageEndProfiles, stagesBehind } from '../../../app/section/stageEnds';
import { sectionSentence, sectionTable } from '../../../app/section/tables';
import { layCycle } from '../../../solver/model';
import { solve } from '../../../solver/planning';
import { lining } from '../support/lining';

const HOUR = 3600;
/** With a contact behind the backing that makes a jump to be seen. */
const plan = lining((project) => {
  const layers = project.part.layers.map((layer) => (layer.id === 'l2' ? { ...layer, contact: 0.05 } : layer));
  return { ...project, part: { ...project.part, layers } };
});
const laid = layCycle(plan);
const { frames } = solve(plan);
const thicknesses = plan.part.layers.map(({ thickness }) => thickness);
const row = layLayers(thicknesses, 100, 574, 6);
const across = pointsAcross(frames, row);
const geometry: SectionGeometry = {
  width: 700,
  height: 350,
  left: 100,
  right: 574,
  top: 40,
  bottom: 300,
  row,
  axis: valueAxis(0, 600, 300, 40, 'temperature', 'SI'),
};

describe('points across', () => {
  it('lie at their depth while the layers are those of the run', () => {
    const { position_m } = frames;
    position_m.forEach((depth, i) => expect(across[i]).toBeCloseTo(100 + depth * 2000, 6));
  });

  it('keep their place inside a layer that is being made thicker', () => {
    const thicker = layLayers([0.3, 0.075, 0.012], 0, 387, 6);
    const moved = pointsAcross(frames, thicker);
    expect(moved[frames.layerStart[1]]).toBeCloseTo(300, 6);
    expect(moved[moved.length - 1]).toBeCloseTo(387, 6);
  });

  it('go by depth where the layers are others', () => {
    const moved = pointsAcross(frames, layLayers([0.237], 0, 237, 6));
    expect(moved[frames.layerStart[1]]).toBeCloseTo(150, 6);
  });
});

describe('profiles', () => {
  const profile = profileAt(frames, 5 * HOUR);
  const scale = geometry.axis.scale;

  it('are a piece a layer, with an upright jump only where the sides of an edge differ', () => {
    expect(profilePath(frames, across, profile, scale).match(/M/g)).toHaveLength(3);
    const jumps = jumpPath(frames, across, profile, scale);
    expect(jumps.match(/M/g)).toHaveLength(1);
    expect(jumps.startsWith(`M${across[frames.layerStart[2]]}`)).toBe(true);
  });

  it('are read on either side of a contact', () => {
    const after = frames.layerStart[2];
    expect(temperatureIn(frames, profile, 1, 1)).toBe(profile[after - 1]);
    expect(temperatureIn(frames, profile, 2, 0)).toBe(profile[after]);
    expect(temperatureIn(frames, profile, 0, 0)).toBe(profile[0]);
    expect(profile[after - 1] - profile[after]).toBeGreaterThan(1);
  });

  it('are sampled for the strip at equal pixels, from one face to the other', () => {
    const strip = sampleAcross(across, profile, 100, 574, 474);
    expect(Math.abs(strip[0] - profile[0])).toBeLessThan(2);
    expect(Math.abs(strip[473] - profile[profile.length - 1])).toBeLessThan(2);
    expect(strip.every((value, i) => i === 0 || value <= strip[i - 1] + 1e-9)).toBe(true);
  });
});

describe('sides', () => {
  it('follow the set-point, hold a temperature, or are insulated, stage by stage', () => {
    const at = (time: number) => sidesAt(plan, laid, time).map(({ kind, name, temperature }) => [kind, name, temperature]);
    expect(at(2.5 * HOUR)).toEqual([
      ['film', 'Gas', 275],
      ['film', 'Surroundings', 25],
    ]);
    expect(at(7.5 * HOUR)[0]).toEqual(['temperature', 'Held at', 550]);
    expect(at(8.5 * HOUR)[0]).toEqual(['insulated', 'Insulated', null]);
    expect(at(9 * HOUR)[0]).toEqual(['insulated', 'Insulated', null]);
  });

  it('bend a film to the face, run straight into a held face, and hatch an insulated one', () => {
    const [film] = sidesAt(plan, laid, HOUR);
    const [held] = sidesAt(plan, laid, 7 * HOUR);
    const [insulated] = sidesAt(plan, laid, 8.5 * HOUR);
    expect(coursePath(film, 100, geometry)).toContain('C');
    expect(coursePath(held, 550, geometry)).toMatch(/H100$/);
    expect(coursePath(insulated, 550, geometry)).toBe('');
    expect(insulationPath(insulated, geometry)).not.toBe('');
    expect(insulationPath(film, geometry)).toBe('');
  });

  it('know the range of all temperatures outside', () => {
    expect(outsideRange(laid)).toEqual([25, 550]);
  });
});

describe('differences', () => {
  it('are taken within pieces of one material: neighbours of a material are one piece', () => {
    expect(piecesOf(frames, plan)).toEqual([0, frames.layerStart[2], frames.position_m.length]);
    const profile = [500, 400, 300, 290, 100, 90];
    expect(largestWithin(profile, [0, 3, 6])).toEqual({ value: 200, hot: 0, cold: 2 });
    expect(largestWithin(profile, [0, 4, 6])).toEqual({ value: 210, hot: 0, cold: 3 });
    expect(largestWithin(profile, [0, 6])).toEqual({ value: 410, hot: 0, cold: 5 });
  });

  it('that a requirement limits are drawn between their two points, and flagged when over', () => {
    const profile = profileAt(frames, 5 * HOUR);
    const bracket = bracketOf(plan, frames, across, profile, geometry.axis.scale, 'SI');
    expect(bracket?.limit).toBe('limit 200 K');
    const { value } = largestWithin(profile, piecesOf(frames, plan));
    expect(bracket?.text).toBe(`${Math.round(value)} K`);
    expect(bracket?.broken).toBe(value > 200);
    expect(bracketOf({ ...plan, requirements: [] }, frames, across, profile, geometry.axis.scale, 'SI')).toBeNull();
  });

  it('too small to draw are not drawn', () => {
    expect(bracketOf(plan, frames, across, profileAt(frames, 0), geometry.axis.scale, 'SI')).toBeNull();
  });
});

describe('profiles at stage ends', () => {
  it('are those behind the playhead', () => {
    expect([0, 5.9, 6, 8.2, 9].map((hours) => stagesBehind(laid, hours * HOUR))).toEqual([0, 0, 1, 2, 3]);
    const profiles = stageEndProfiles(laid, 2, frames, across, geometry);
    expect(profiles.map(({ id }) => id)).toEqual(['heat', 'soak']);
    expect(profiles[0].name?.text).toBe('end of Heat');
  });

  it('have names that do not lie on one another', () => {
    const same = { ...laid, stages: laid.stages.map((stage) => ({ ...stage, end: 6 * HOUR })) };
    const boxes = stageEndProfiles(same, 3, frames, across, geometry).flatMap(({ name }) => (name === null ? [] : [name.box]));
    boxes.forEach((a, i) =>
      boxes.slice(i + 1).forEach((b) => {
        const apart = a.x + a.width <= b.x || b.x + b.width <= a.x || Math.abs(a.y - b.y) >= 12;
        expect(apart).toBe(true);
      }),
    );
  });
});

describe('captions', () => {
  const layers = (widths: number[]) => {
    let left = 0;
    return widths.map((width, index) => {
      left += width;
      return { name: `Layer ${index + 1}`, thickness: '100 mm', left: left - width, right: left };
    });
  };

  it('say name and thickness where there is room, with dimension lines where there is plenty', () => {
    const [wide, narrow, name] = captionsOf(layers([300, 110, 60, 200]), 0);
    expect([wide.name, wide.thickness, wide.airy]).toEqual(['Layer 1', '100 mm', true]);
    expect([narrow.thickness, narrow.airy]).toEqual(['100 mm', false]);
    expect([name.name, name.thickness]).toEqual(['Layer 3', '']);
  });

  it('fall back to the number, and to nothing, so that 30 layers stay apart', () => {
    const captions = captionsOf(layers(Array.from({ length: 30 }, (_, i) => (i % 3 === 0 ? 8 : 22))), 0);
    expect(captions.every(({ name }) => /^\d+$/.test(name))).toBe(true);
    expect(captions).toHaveLength(20);
  });

  it('of the last layer lean out over the end of the part', () => {
    const last = captionsOf(layers([300, 20]), 98)[1];
    expect([last.thickness, last.anchor]).toEqual(['100 mm', 'start']);
  });
});

describe('the section in words and figures', () => {
  it('says the temperatures of both faces, in the units on screen', () => {
    expect(sectionSentence(plan, frames, 0, 'SI')).toBe(
      'Section through Lining, Backing, Shell. Temperature at 0 s: Hot face 25 °C, Cold face 25 °C.',
    );
    expect(sectionSentence(plan, frames, 0, 'US')).toContain('Hot face 77 °F');
    expect(sectionSentence(plan, null, 0, 'SI')).toContain('No answer yet');
  });

  it('lists the profile with its extremes, and the flux at the faces only', () => {
    const { rows, columns } = sectionTable(plan, frames, 5 * HOUR, 'SI');
    expect(columns[1]).toBe('Depth, mm');
    expect(rows).toHaveLength(frames.position_m.length);
    expect(rows[0][0]).toBe('Lining');
    expect(rows[rows.length - 1][0]).toBe('Shell');
    expect(rows.filter((cells) => cells[5] !== null)).toHaveLength(2);
    for (const [, , now, low, high] of rows) {
      expect(Number(now)).toBeGreaterThanOrEqual(Number(low));
      expect(Number(now)).toBeLessThanOrEqual(Number(high));
    }
  });

  it('has a short form with the edges of the layers', () => {
    const { rows } = sectionTable(plan, frames, HOUR, 'SI', true);
    expect(rows.map(([layer]) => layer)).toEqual(['Lining', 'Lining', 'Backing', 'Backing', 'Shell', 'Shell']);
    expect(sectionTable(null, null, 0, 'SI').rows).toEqual([]);
  });
});

describe('a layer too thin to see', () => {
  it('is widened and stays under the profile', () => {
    const thin = lining((project) => {
      const layers = project.part.layers.map((layer) => (layer.id === 'l2' ? { ...layer, thickness: 0.0001 } : layer));
      return { ...project, part: { ...project.part, layers }, probes: [], requirements: [] };
    });
    const run = solve(thin);
    const wide = layLayers(
      thin.part.layers.map(({ thickness }) => thickness),
      0,
      400,
      6,
    );
    const points = pointsAcross(run.frames, wide);
    const { layerStart } = run.frames;
    expect(wide.toScale).toBe(false);
    expect(points[layerStart[2] - 1] - points[layerStart[1]]).toBeCloseTo(6, 6);
    const scale = linearScale(0, 600, 100, 0);
    expect(profilePath(run.frames, points, profileAt(run.frames, HOUR), scale)).not.toContain('NaN');
  });
});
