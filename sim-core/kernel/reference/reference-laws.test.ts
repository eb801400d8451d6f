import { describeChanceLaws } from '#sim-core/testing/chance-laws.ts';
import { describeFieldLaws } from '#sim-core/testing/field-laws.ts';
import { describeWaveShapes } from '#sim-core/testing/wave-shapes.ts';
import { createReferenceKernel } from './reference-kernel.ts';

describeFieldLaws('the reference kernel', createReferenceKernel);
describeChanceLaws('the reference kernel', createReferenceKernel);
describeWaveShapes('the reference kernel', createReferenceKernel);
