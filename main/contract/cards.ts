import { z } from 'zod'

const positive = (max: number) => z.number().positive().max(max)

const deviceSchema = z.strictObject({
  vt_v: positive(5),
  vt_temp_v_k: z.number().min(0).max(0.05),
  kp_a_v2: positive(1),
  slope: z.number().min(1).max(5),
  theta_per_v: z.number().min(0).max(100),
  lambda_per_v: z.number().min(0).max(10),
  avt_v_m: z.number().min(0).max(1e-6),
  abeta_m: z.number().min(0).max(1e-5),
  gamma: positive(20),
})

/** A process card: the parameters of one technology. SI units, capacitances per metre of width unless said. */
export const cardSchema = z.strictObject({
  id: z.string().min(1).max(80),
  title: z.string().max(200),
  l_min_m: positive(1e-4),
  w_min_m: positive(1e-3),
  vdd_v: z.number().min(0.05).max(15),
  n: deviceSchema,
  p: deviceSchema,
  cap: z.strictObject({
    cox_f_m2: positive(10),
    fringe_f_m: positive(1e-6),
    junction_f_m: positive(1e-6),
    wire_f: z.number().min(0).max(1e-9),
    dac_f_m2: positive(1),
    trim_unit_f: positive(1e-9),
  }),
  logic: z.strictObject({
    fo4_s: positive(1e-3),
    gate_energy_j: z.number().min(0).max(1e-6),
    gate_area_m2: z.number().min(0).max(1e-3),
    leak_a_m: z.number().min(0).max(1e3),
  }),
  layout: z.strictObject({ factor: z.number().min(1).max(1000), diffusion_pitch_m: z.number().min(0).max(1e-3) }),
  corner: z.strictObject({ vt_shift_v: z.number().min(0).max(1), kp_ratio: z.number().min(0).max(0.9) }),
})

export type Card = z.infer<typeof cardSchema>
export type CardDevice = Card['n']
