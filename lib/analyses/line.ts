import { Matrix, QrDecomposition } from "ml-matrix";

/** y = `height` + `slope`·x. */
export interface Line {
  readonly slope: number;
  readonly height: number;
}

/**
 * The best straight line through points with the abscissae given, by least squares: QR of the matrix of columns 1 and x − mean
 * (Golub and Van Loan, Matrix Computations, section 5.3), which is factorised once for any number of ordinates.
 */
export class LineFit {
  /** null where there are no two points. */
  private readonly qr: QrDecomposition | null;
  private readonly mean: number;

  constructor(private readonly xs: Float64Array) {
    this.mean = xs.reduce((sum, x) => sum + x, 0) / xs.length;
    const design = new Matrix(xs.length, 2);
    for (let i = 0; i < xs.length; i++) {
      design.set(i, 0, 1);
      design.set(i, 1, xs[i]! - this.mean);
    }
    const isLine = xs.length > 1 && xs.every(Number.isFinite);
    this.qr = isLine ? new QrDecomposition(design) : null;
  }

  /** One ordinate an abscissa; NaN where one of them is no number, or there are no two abscissae. */
  line(ys: Float64Array): Line {
    if (this.qr === null || !ys.every(Number.isFinite) || !this.qr.isFullRank())
      return { slope: Number.NaN, height: Number.NaN };
    const found = this.qr.solve(Matrix.columnVector(ys));
    const slope = found.get(1, 0);
    return { slope, height: found.get(0, 0) - slope * this.mean };
  }

  /** Ordinates less those of the line. */
  deviations(ys: Float64Array): Float64Array {
    const { slope, height } = this.line(ys);
    return ys.map((y, i) => y - (height + slope * this.xs[i]!));
  }
}
