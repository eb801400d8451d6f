import { describeChanceLaws } from '#sim-core/testing/chance-laws.ts';
import { describeFieldLaws } from '#sim-core/testing/field-laws.ts';
import { describeWaveShapes } from '#sim-core/testing/wave-shapes.ts';
import { createSimdKernel } from './simd-kernel.ts';

describeFieldLaws('the shipping kernel', createSimdKernel);
describeChanceLaws('the shipping kernel', createSimdKernel);
describeWaveShapes('the shipping kernel', createSimdKernel);
