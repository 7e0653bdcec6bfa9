/**
 * Fill-reducing elimination order for a rectangular grid: each part is cut by a line of cells that is
 * eliminated after both halves.
 *
 * Source    George A. (1973), Nested dissection of a regular finite element mesh, SIAM J. Numer. Anal. 10(2), 345–363.
 * Shapes    returns order[position] = cell, cell = iy*nx + ix
 */
export function nestedDissection(nx: number, ny: number): Int32Array {
  const order = new Int32Array(nx * ny);
  let next = 0;
  const visit = (x0: number, x1: number, y0: number, y1: number): void => {
    const width = x1 - x0;
    const height = y1 - y0;
    if (width <= 0 || height <= 0) return;
    if (width <= 3 && height <= 3) {
      for (let iy = y0; iy < y1; iy++) for (let ix = x0; ix < x1; ix++) order[next++] = iy * nx + ix;
      return;
    }
    if (width >= height) {
      const cut = (x0 + x1) >> 1;
      visit(x0, cut, y0, y1);
      visit(cut + 1, x1, y0, y1);
      for (let iy = y0; iy < y1; iy++) order[next++] = iy * nx + cut;
    } else {
      const cut = (y0 + y1) >> 1;
      visit(x0, x1, y0, cut);
      visit(x0, x1, cut + 1, y1);
      for (let ix = x0; ix < x1; ix++) order[next++] = cut * nx + ix;
    }
  };
  visit(0, nx, 0, ny);
  return order;
}
