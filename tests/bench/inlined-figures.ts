/**
 * The volume and the headline figures of a shaken drink in plain arithmetic, written out by hand in one function: no checks, no objects but
 * the result, no warnings. It shows what the layers of the real code cost. A test in the bench holds its results to those
 * of the real code.
 */

export interface PlainLine {
  readonly volumeMl: number;
  readonly ethanolG: number;
  readonly waterG: number;
  readonly sugarG: number;
  readonly acidG: number;
  readonly acidMl: number;
  readonly acidCitricG: number;
  readonly restG: number;
}

const RHO_E = 0.7892391233;
const RHO_W = 0.99820123;

function rhoEthanol(p: number): number {
  return (
    (998.20123 +
      p *
        (-192.9769495 +
          p *
            (389.1238958 +
              p *
                (-1668.103923 +
                  p *
                    (13522.15441 +
                      p *
                        (-88292.78388 +
                          p *
                            (306287.4042 +
                              p *
                                (-613838.1234 +
                                  p *
                                    (747017.2998 +
                                      p * (-547846.1354 + p * (223446.0334 - p * 39032.85426))))))))))) /
    1000
  );
}

function rhoSugar(w: number): number {
  return (
    RHO_W +
    (w * (385.1761 + w * (135.3705 + w * (40.9299 + w * (-3.9643 + w * (13.4853 - w * 17.289)))))) / 1000
  );
}

/** Newton steps with a difference for the slope. */
function massFraction(q: number, guess: number): number {
  let p = guess;
  for (let step = 0; step < 12; step += 1) {
    const f = (p * rhoEthanol(p)) / RHO_E - q;
    const g = ((p + 1e-6) * rhoEthanol(p + 1e-6)) / RHO_E - q;
    const d = (f * 1e-6) / (g - f);
    p -= d;
    if (Math.abs(d) < 1e-7) break;
  }
  return p;
}

function sugarFraction(c: number, guess: number): number {
  let x = guess;
  for (let step = 0; step < 12; step += 1) {
    const f = x * rhoSugar(x) - c;
    const g = (x + 1e-6) * rhoSugar(x + 1e-6) - c;
    const d = (f * 1e-6) / (g - f);
    x -= d;
    if (Math.abs(d) < 1e-7) break;
  }
  return x;
}

/** Tabarié volume by secant steps on V, both inverses starting where the last one ended. */
function volume(e: number, w: number, s: number): number {
  const m = e + w + s;
  if (s === 0) return m / rhoEthanol(e / m);
  let p = e / (e + w);
  let x = s / (s + w);
  let V0 = (e + w) / rhoEthanol(p) + (s + w) / rhoSugar(x) - w / RHO_W;
  p = massFraction(e / RHO_E / V0, p);
  x = sugarFraction(s / V0, x);
  let f0 = V0 * (rhoEthanol(p) + rhoSugar(x) - RHO_W) - m;
  let V1 = V0 - f0;
  for (let step = 0; step < 12; step += 1) {
    p = massFraction(e / RHO_E / V1, p);
    x = sugarFraction(s / V1, x);
    const f1 = V1 * (rhoEthanol(p) + rhoSugar(x) - RHO_W) - m;
    if (Math.abs(f1) < 1e-8 || f1 === f0) break;
    const V2 = V1 - (f1 * (V1 - V0)) / (f1 - f0);
    V0 = V1;
    f0 = f1;
    V1 = V2;
  }
  return V1;
}

export function plainFigures(lines: readonly PlainLine[]) {
  let e = 0;
  let w = 0;
  let s = 0;
  let a = 0;
  let aMl = 0;
  let citric = 0;
  let r = 0;
  for (const line of lines) {
    e += line.volumeMl * line.ethanolG;
    w += line.volumeMl * line.waterG;
    s += line.volumeMl * line.sugarG;
    a += line.volumeMl * line.acidG;
    aMl += line.volumeMl * line.acidMl;
    citric += line.volumeMl * line.acidCitricG;
    r += line.volumeMl * line.restG;
  }
  const extra = aMl + 0.62 * r;
  const undilutedMl = volume(e, w, s) + extra;
  const abv = e / RHO_E / undilutedMl;
  const dilution = (-1.567 * abv + 1.742) * abv + 0.203;
  w += dilution * undilutedMl * RHO_W;
  const finalMl = volume(e, w, s) + extra;
  return {
    undilutedMl,
    finalMl,
    finalMassG: e + w + s + a + r,
    abvFraction: e / RHO_E / finalMl,
    sugarGPerL: (1000 * s) / finalMl,
    acidCitricGPerL: (1000 * citric) / finalMl,
    energyKcal: 7 * e + 4 * s + 3 * a,
  };
}
