import type { RunState } from '../contract/runs';

/** The allowed moves of a run, as data. A run is confirmed once; what was handed over cannot be called off. */
export const runMoves: Readonly<Record<RunState, readonly RunState[]>> = {
  proposed: ['confirmed', 'called-off'],
  confirmed: ['underway', 'called-off'],
  underway: ['handed-over', 'called-off'],
  'handed-over': ['closed'],
  closed: [],
  'called-off': [],
};

/** Whether a run may go from one state to another; staying put is not a move. */
export const canMoveRun = (from: RunState, to: RunState): boolean => runMoves[from].includes(to);
