/** Walden figure of merit P/(2^ENOB·f_s) [J]; R. H. Walden, IEEE JSAC 17(4), 1999. */
export const waldenFigure = (power: number, enob: number, rate: number): number => power / (2 ** enob * rate)

/** Schreier figure of merit SNDR + 10·log10(f_s/2/P) [dB]; R. Schreier, G. C. Temes, Understanding Delta-Sigma Data Converters, 2005. */
export const schreierFigure = (sndrDb: number, rate: number, power: number): number => sndrDb + 10 * Math.log10(rate / 2 / power)
