import { z } from 'zod';
import { damperModelSchema, impedanceRowSchema } from './dampers.ts';

/** Name and version of the engine's documents. */
export const engineSchemaName = 'stillspan.engine/1';

const finite = () =>
  z.number({ error: (issue) => (issue.input === undefined ? 'is required' : 'must be a finite number') });
const schemaName = z.literal(engineSchemaName).optional().describe('Name of this kind of document; may be left out');

const wireFields = {
  diameterM: finite().min(0.001).max(0.2).describe('Diameter over the outer strands, m'),
  massKgPerM: finite().min(0.005).max(50).describe('Mass per length, kg/m'),
  ratedStrengthN: finite().min(100).max(5e6).describe('Rated strength, N'),
  bendingStiffnessMinNm2: finite().min(1e-4).max(1e6).describe('Bending stiffness with strands sliding freely, N·m²'),
  outerStrandDiameterM: finite().min(1e-4).max(0.2).describe('Diameter of an outer strand, m'),
  outerStrandModulusPa: finite().min(1e9).max(1e12).describe('Modulus of elasticity of an outer strand, Pa'),
};
export const engineWireSchema = z.strictObject(wireFields);

/** A wire of which only mass and stiffness are needed. */
const waveWireSchema = z.strictObject({
  ...wireFields,
  diameterM: wireFields.diameterM.optional(),
  ratedStrengthN: wireFields.ratedStrengthN.optional(),
  outerStrandDiameterM: wireFields.outerStrandDiameterM.optional(),
  outerStrandModulusPa: wireFields.outerStrandModulusPa.optional(),
});

const tension = finite().min(1).max(5e6).describe('Horizontal tension, N');
export const engineFrequenciesSchema = z
  .array(finite().positive('must be above 0').max(1000))
  .min(1)
  .max(20_000)
  .describe('Frequencies in any order, Hz');

/** A damper as the engine takes it: the service's models, and tables at several clamp velocities. */
export const engineDamperModelSchema = z.discriminatedUnion('kind', [
  ...damperModelSchema.options,
  z.strictObject({
    kind: z.literal('velocity-tables'),
    tables: z
      .array(
        z.strictObject({
          clampVelocityMPerS: finite().positive('must be above 0').max(5),
          rows: z.array(impedanceRowSchema).min(2).max(2000),
        }),
      )
      .min(2)
      .max(12),
  }),
]);

export const engineEndSchema = z.strictObject({
  clampReflectionRatio: finite().min(0).max(1).optional().describe('Factor on the reflection for loss in the clamp'),
  dampers: z
    .array(
      z.strictObject({
        distanceM: finite().positive('must be above 0').describe('From the last point of contact at the clamp, m'),
        model: engineDamperModelSchema,
      }),
    )
    .max(12),
  armourRods: z
    .strictObject({
      lengthM: finite()
        .positive('must be above 0')
        .describe('From the last point of contact to the end of the rods, m'),
      massKgPerM: finite().positive('must be above 0').max(100).describe('Wire and rods together, kg/m'),
      bendingStiffnessNm2: finite().min(1e-4).max(1e7).describe('Wire and rods together, N·m²'),
    })
    .optional(),
  support: z
    .strictObject({
      massKg: finite().min(0).max(5000),
      stiffnessNPerM: finite().min(0).max(1e9),
      dampingNsPerM: finite().min(0).max(1e6),
    })
    .optional()
    .describe('A clamp that moves, as one span feels it; left out, it stands still'),
});

const spanFields = {
  lengthM: finite().min(1).max(10_000).describe('Span length, m'),
  tensionN: tension,
  bearingRad: finite()
    .min(-2 * Math.PI)
    .max(4 * Math.PI)
    .optional()
    .describe('Bearing from true north, rad'),
};

const methodName = (kind: string) => z.string().max(100).optional().describe(`Registry name of the ${kind} method`);
export const engineMethodsSchema = z.strictObject({
  strouhal: methodName('Strouhal number'),
  windPower: methodName('wind power'),
  turbulence: methodName('turbulence'),
  selfDamping: methodName('self-damping'),
  life: methodName('fatigue life'),
});

const source = z.string().min(1).max(400);
export const engineCurvesSchema = z.strictObject({
  windPower: z
    .strictObject({
      rows: z
        .array(z.strictObject({ amplitudeRatio: finite(), windPowerNumber: finite() }))
        .min(2)
        .max(500),
      source,
    })
    .optional(),
  turbulence: z
    .strictObject({
      rows: z
        .array(z.strictObject({ turbulenceIntensityRatio: finite(), factorRatio: finite() }))
        .min(1)
        .max(500),
      source,
    })
    .optional(),
  selfDamping: z
    .strictObject({
      coefficientNumber: finite(),
      amplitudeExponentNumber: finite(),
      frequencyExponentNumber: finite(),
      tensionExponentNumber: finite(),
      source,
    })
    .optional(),
});

export const engineAirSchema = z.strictObject({
  densityKgPerM3: finite().min(0.3).max(2).describe('Air density, kg/m³'),
  turbulenceIntensityRatio: finite().min(0).max(1).describe('Turbulence intensity'),
});

/** Input of the engine's `waves` command. */
export const wavesInputSchema = z.strictObject({
  schema: schemaName,
  wire: waveWireSchema.extend({ bendingStiffnessMinNm2: finite().min(0).max(1e6) }),
  span: z.strictObject({ ...spanFields, lengthM: spanFields.lengthM.optional() }),
  frequenciesHz: engineFrequenciesSchema,
});

/** Input of the engine's `end` command. */
export const endInputSchema = z.strictObject({
  schema: schemaName,
  wire: waveWireSchema,
  tensionN: tension,
  end: engineEndSchema,
  frequenciesHz: engineFrequenciesSchema,
});

/** Input of the engine's `damper` command. */
export const damperInputSchema = z.strictObject({
  schema: schemaName,
  model: engineDamperModelSchema,
  frequenciesHz: engineFrequenciesSchema,
});

/** Input of the engine's `span` command. */
export const spanInputSchema = z.strictObject({
  schema: schemaName,
  wire: engineWireSchema,
  span: z.strictObject(spanFields),
  air: engineAirSchema,
  ends: z.tuple([engineEndSchema, engineEndSchema]),
  frequenciesHz: engineFrequenciesSchema,
  methods: engineMethodsSchema.optional(),
  curves: engineCurvesSchema.optional(),
});

const sectorSchema = z.strictObject({
  directionRad: finite().describe('Direction the wind comes from, from true north, rad'),
  shareRatio: finite().min(0).max(1),
  weibullScaleMPerS: finite().positive('must be above 0').max(60),
  weibullShapeNumber: finite().min(0.3).max(20),
});
const fatigueCurveSchema = z.enum(['multi-layer', 'single-layer']).describe('Safe border line of the conductor');
const windBandSchema = z.strictObject({ lowerMPerS: finite().min(0.1).max(40), upperMPerS: finite().min(0.1).max(40) });
const caseFields = {
  schema: schemaName,
  wire: engineWireSchema,
  span: z.strictObject({ ...spanFields, bearingRad: spanFields.bearingRad.unwrap() }),
  air: engineAirSchema,
  ends: z.tuple([engineEndSchema, engineEndSchema]),
  windBand: windBandSchema.optional().describe('1 to 7 m/s when left out'),
  frequencyCount: z.number().int().min(2).max(5000).optional(),
  methods: engineMethodsSchema.optional(),
  curves: engineCurvesSchema.optional(),
};

/** Input of the engine's `life` command. */
export const lifeInputSchema = z.discriminatedUnion('from', [
  z.strictObject({
    ...caseFields,
    from: z.literal('climate'),
    climate: z.strictObject({ sectors: z.array(sectorSchema).min(1).max(360) }),
    fatigueCurve: fatigueCurveSchema,
  }),
  z.strictObject({
    schema: schemaName,
    from: z.literal('recorder'),
    wire: engineWireSchema,
    tensionN: tension,
    fatigueCurve: fatigueCurveSchema,
    recorder: z.strictObject({
      durationS: finite().min(1).describe('Time over which cycles were counted, s'),
      distanceM: finite().min(0.01).max(1).optional().describe('From the last point of contact; 0.089 m when left out'),
      cells: z
        .array(
          z.strictObject({
            frequencyHz: finite().positive('must be above 0').max(1000),
            bendingAmplitudePkPkM: finite().min(0).max(0.02),
            cycleCount: finite().min(0),
          }),
        )
        .min(1)
        .max(20_000),
    }),
  }),
]);

const { ends: _ends, ...placeCaseFields } = caseFields;

/** Input of the engine's `place` command; both ends get the same dampers. */
export const placeInputSchema = z.strictObject({
  ...placeCaseFields,
  span: z.strictObject(spanFields),
  limits: z.strictObject({
    endurance: z.strictObject({ stressPa: finite().positive('must be above 0').max(1e9), source: z.string().max(400) }),
    damperedStrain: z
      .strictObject({
        strainRatio: finite().positive('must be above 0').max(0.01),
        convention: z.enum(['peak-to-peak', 'zero-to-peak']),
        source: z.string().max(400),
      })
      .nullable(),
  }),
  catalogue: z
    .array(z.strictObject({ name: z.string().min(1).max(100), model: engineDamperModelSchema }))
    .min(1)
    .max(20),
  damperLimitCount: z.number().int().min(0).max(3).describe('Most dampers per end'),
  distance: z.strictObject({
    lowerM: finite().min(0.05),
    upperM: finite().max(30),
    stepM: finite().min(0.001).max(1),
  }),
  toleranceM: finite()
    .min(0)
    .max(0.5)
    .optional()
    .describe('How far a damper may be fitted from its plan; 0 when left out'),
  tensionsN: z
    .array(tension)
    .min(1)
    .max(6)
    .optional()
    .describe('Over the seasons; the tension of the span when left out'),
});
