import { z } from 'zod';
import { idSchema, instantSchema, pageOf, pageQuery } from './paging.ts';
import { route } from './route.ts';

/** What a basis decides: methods, limits and the thresholds of the grades. */
export const basisSpecSchema = z.strictObject({
  windBand: z
    .strictObject({ lowerMPerS: z.number().min(0.2).max(20), upperMPerS: z.number().min(0.5).max(30) })
    .refine((band) => band.lowerMPerS < band.upperMPerS, {
      error: 'lower end must be below the upper end',
      path: ['upperMPerS'],
    }),
  frequencyCount: z.number().int().min(20).max(1000).describe('Frequencies in the sweep'),
  methods: z.strictObject({
    strouhal: z.string().optional(),
    windPower: z.string().optional(),
    turbulence: z.string().optional(),
    selfDamping: z.string().optional(),
    life: z.string().optional(),
  }),
  limits: z.strictObject({
    enduranceMultiLayerPa: z.number().positive().max(1e9),
    enduranceSingleLayerPa: z.number().positive().max(1e9),
    enduranceAlloyPa: z.number().positive().max(1e9),
    enduranceSource: z.string().min(1).max(400),
    damperedStrainRatio: z.number().positive().max(0.01).nullable(),
    damperedStrainConvention: z.enum(['peak-to-peak', 'zero-to-peak']),
    damperedStrainSource: z.string().max(400),
  }),
  governs: z
    .enum(['limit', 'life', 'worse-of-both'])
    .describe('Whether limit ratios, fatigue life, or the worse of both set the grade'),
  thresholds: z.strictObject({
    noticeFromRatio: z.number().positive().max(10),
    actFromRatio: z.number().positive().max(10),
    urgentFromRatio: z.number().positive().max(100),
    noticeBelowYears: z.number().positive().max(1000),
    actBelowYears: z.number().positive().max(1000),
    urgentBelowYears: z.number().positive().max(1000),
  }),
  climateId: idSchema.nullable().describe('Wind climate for the life view; null leaves life out'),
  airDensityKgPerM3: z.number().min(0.5).max(1.6),
  digestFromCount: z
    .number()
    .int()
    .min(2)
    .max(10_000)
    .describe(
      'From this many new Urgent findings in one assessment, each safety officer gets one message that lists them all',
    ),
});
export type BasisSpec = z.infer<typeof basisSpecSchema>;

export const basisSchema = z.object({
  id: idSchema,
  name: z.string(),
  versionNumber: z.number().int(),
  isDefault: z.boolean(),
  isLatest: z.boolean(),
  spec: basisSpecSchema,
  createdAt: instantSchema,
  createdByName: z.string().nullable(),
});
export type Basis = z.infer<typeof basisSchema>;

export const basisInputSchema = z.strictObject({
  name: z.string().trim().min(1).max(80),
  spec: basisSpecSchema,
  isDefault: z.boolean().default(false),
});

export const basisRoutes = {
  listBases: route({
    method: 'get',
    path: '/catalogue/bases',
    summary: 'Bases, every version',
    access: ['engineer', 'manager', 'safety-officer', 'admin'],
    query: z.object(pageQuery),
    response: pageOf(basisSchema),
    status: 200,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed'],
  }),
  createBasis: route({
    method: 'post',
    path: '/catalogue/bases',
    summary: 'Save a basis; a name that exists gets its next version',
    access: ['engineer'],
    body: basisInputSchema,
    response: basisSchema,
    status: 201,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed', 'csrf-refused'],
    isIdempotent: true,
  }),
};
