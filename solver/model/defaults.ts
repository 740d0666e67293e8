import { FORMAT, VERSION, type Project } from './project';

/** A new plan: one wall, one heating stage, a probe at each face; it runs as it is. Material values are placeholders to be replaced from a data sheet. */
export function newProject(): Project {
  return {
    format: FORMAT,
    version: VERSION,
    title: 'Untitled plan',
    notes: '',
    materials: [
      {
        id: 'm1',
        name: 'Carbon steel, rounded values',
        conductivity: 45,
        density: 7850,
        heatCapacity: 500,
        source: 'from memory, rounded',
      },
    ],
    part: {
      kind: 'wall',
      innerRadius: 0,
      layers: [{ id: 'l1', name: 'Layer 1', material: 'm1', thickness: 0.05, contact: 0 }],
      faces: { start: { name: 'Start face' }, end: { name: 'End face' } },
    },
    initial: { temperature: 20 },
    cycle: {
      setPoint: { name: 'Set-point', start: 20 },
      stages: [
        {
          id: 's1',
          name: 'Heat',
          end: { after: 7200 },
          setPoint: { segments: [{ to: 200, duration: 3600 }] },
          exposures: {
            start: { kind: 'film', coefficient: 25, surroundings: { follow: 'setPoint', offset: 0 } },
            end: { kind: 'insulated' },
          },
        },
      ],
    },
    probes: [
      { id: 'p1', name: 'Start face', at: { face: 'start' } },
      { id: 'p2', name: 'End face', at: { face: 'end' } },
    ],
    requirements: [],
    settings: { scheme: 'automatic', accuracy: 0.1, dampedSteps: 4, grid: 'automatic' },
    output: {},
  };
}
