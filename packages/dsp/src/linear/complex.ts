/** A complex number. */
export interface Complex {
  re: number;
  im: number;
}

export function complexAdd(a: Complex, b: Complex): Complex {
  return { re: a.re + b.re, im: a.im + b.im };
}

export function complexSubtract(a: Complex, b: Complex): Complex {
  return { re: a.re - b.re, im: a.im - b.im };
}

export function complexMultiply(a: Complex, b: Complex): Complex {
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

/** a/b by Smith's method (Comm. ACM 5, 1962): no intermediate square that could overflow or vanish. */
export function complexDivide(a: Complex, b: Complex): Complex {
  if (Math.abs(b.re) >= Math.abs(b.im)) {
    const ratio = b.im / b.re;
    const scale = b.re + b.im * ratio;
    return { re: (a.re + a.im * ratio) / scale, im: (a.im - a.re * ratio) / scale };
  }
  const ratio = b.re / b.im;
  const scale = b.re * ratio + b.im;
  return { re: (a.re * ratio + a.im) / scale, im: (a.im * ratio - a.re) / scale };
}

export function complexAbs({ re, im }: Complex): number {
  return Math.hypot(re, im);
}

export function fromPolar(magnitude: number, angleDeg: number): Complex {
  const angle = (angleDeg * Math.PI) / 180;
  return { re: magnitude * Math.cos(angle), im: magnitude * Math.sin(angle) };
}

/** Angle in degrees, (−180, 180]; 0 for zero. */
export function angleDegrees({ re, im }: Complex): number {
  const degrees = (Math.atan2(im, re) * 180) / Math.PI;
  return degrees <= -180 ? 180 : degrees;
}
