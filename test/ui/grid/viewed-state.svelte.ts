// What a view is a view of, as reactive as it is in the page.
import type { Row } from '../../../src/ui/grid/rows';

export class ViewedState {
  rows = $state.raw<readonly Row[]>([]);
  cursor = $state('row 0');
  setting = $state('plain');
}
