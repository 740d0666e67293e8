/** Parts as the reference cases give them: layers from one depth or radius to another, ρ c as one number. */
import type { Part, Project } from '../../solver/model';
import { wall, type LayerSpec, type StageSpec } from '../support';

interface LayeredCase {
  layers: { from_m: number; to_m: number; k_W_mK: number; rho_cp_J_m3K: number }[];
  contact_resistance_m2K_W?: number[];
  T_initial_degC: number;
}

export const layersOf = ({ layers, contact_resistance_m2K_W: contacts }: LayeredCase): LayerSpec[] =>
  layers.map(({ from_m, to_m, k_W_mK, rho_cp_J_m3K }, i) => ({
    thickness: Number((to_m - from_m).toPrecision(12)),
    conductivity: k_W_mK,
    density: 1000,
    heatCapacity: rho_cp_J_m3K / 1000,
    contact: contacts?.[i],
  }));

/** Lengths of a round part count from the centre. */
export const wallOf = (layered: LayeredCase, stages: StageSpec[], kind: Part['kind'] = 'wall'): Project =>
  wall({ kind, innerRadius: layered.layers[0].from_m, layers: layersOf(layered), initial: layered.T_initial_degC, stages });
