import type { ElementClass } from '../../model/model.ts';

/** What a class of the schema is to us. `typed`: only its type object can say, and `untyped` holds where it has none. */
export interface ClassEntry {
  /** In the schema's spelling. */
  readonly name: string;
  readonly kind: ElementClass | 'typed';
  readonly untyped: ElementClass;
}

const entry = (name: string, kind: ElementClass): ClassEntry => ({ name, kind, untyped: kind });
const general = (name: string, untyped: ElementClass): ClassEntry => ({ name, kind: 'typed', untyped });

const ofKind: Readonly<Record<ElementClass, readonly string[]>> = {
  segment: ['PipeSegment'],
  fitting: ['PipeFitting'],
  terminal: ['SanitaryTerminal', 'WasteTerminal', 'StackTerminal'],
  valve: ['Valve', 'FlowMeter'],
  chamber: ['DistributionChamberElement'],
  treatment: ['Interceptor', 'Tank', 'Pump', 'Filter'],
  other: [
    ...['DuctSegment', 'CableCarrierSegment', 'CableSegment', 'ConveyorSegment'],
    ...['DuctFitting', 'CableCarrierFitting', 'CableFitting', 'JunctionBox'],
    ...['AirTerminal', 'AudioVisualAppliance', 'CommunicationsAppliance', 'FireSuppressionTerminal', 'Lamp'],
    ...['LightFixture', 'MedicalDevice', 'Outlet', 'SpaceHeater', 'LiquidTerminal', 'Signal', 'GasTerminal'],
    ...['MobileTelecommunicationsAppliance', 'AirTerminalBox', 'Damper', 'ElectricDistributionBoard'],
    ...['ElectricDistributionPoint', 'ElectricTimeControl', 'ProtectiveDevice', 'SwitchingDevice', 'DistributionBoard'],
    ...['Compressor', 'Fan', 'ElectricFlowStorageDevice', 'DuctSilencer', 'ElectricFlowTreatmentDevice'],
    ...['AirToAirHeatRecovery', 'Boiler', 'Burner', 'Chiller', 'Coil', 'Condenser', 'CooledBeam', 'CoolingTower'],
    ...['ElectricGenerator', 'ElectricMotor', 'Engine', 'EvaporativeCooler', 'Evaporator', 'HeatExchanger'],
    ...['Humidifier', 'MotorConnection', 'SolarDevice', 'Transformer', 'TubeBundle', 'UnitaryEquipment'],
    ...['GasTurbine', 'SteamTurbine', 'ElectricHeater', 'EnergyConversionDevice', 'ElectricalElement'],
    ...['Actuator', 'Alarm', 'Controller', 'FlowInstrument', 'ProtectiveDeviceTrippingUnit', 'Sensor'],
    ...['UnitaryControlElement', 'DistributionControlElement'],
  ],
};

/**
 * Distribution elements by class in upper case, of IFC2X3, IFC4 and IFC4X3 together. In IFC2X3 an occurrence has one
 * of the general classes and its type says the rest; later files may do the same.
 */
export const elementClasses: ReadonlyMap<string, ClassEntry> = new Map(
  [
    ...Object.entries(ofKind).flatMap(([kind, names]) =>
      names.map((name) => entry(`Ifc${name}`, kind as ElementClass)),
    ),
    general('IfcFlowSegment', 'segment'),
    general('IfcFlowFitting', 'fitting'),
    general('IfcFlowTerminal', 'terminal'),
    general('IfcFlowController', 'valve'),
    general('IfcFlowMovingDevice', 'treatment'),
    general('IfcFlowStorageDevice', 'treatment'),
    general('IfcFlowTreatmentDevice', 'treatment'),
    general('IfcElectricAppliance', 'other'),
    general('IfcDistributionFlowElement', 'other'),
    general('IfcDistributionElement', 'other'),
  ].map((one) => [one.name.toUpperCase(), one]),
);

/**
 * Classes that are no distribution elements by themselves, but carry plumbing in many models. They count where they
 * have a port, stand in a system, or have a distribution type.
 */
export const borrowedClasses: ReadonlyMap<string, string> = new Map(
  ['IfcBuildingElementProxy', 'IfcFurnishingElement', 'IfcFurniture', 'IfcSystemFurnitureElement', 'IfcElementAssembly']
    .concat([
      'IfcTransportElement',
      'IfcEquipmentElement',
      'IfcCivilElement',
      'IfcDiscreteAccessory',
      'IfcBuiltElement',
    ])
    .map((name) => [name.toUpperCase(), name]),
);

/** Classes of type objects, in upper case, with the kind that an occurrence of them is. */
export const typeClasses: ReadonlyMap<string, ClassEntry> = new Map(
  [...elementClasses.values()].map(({ name, kind, untyped }) => {
    const typeName = `${name}Type`;
    return [typeName.toUpperCase(), { name: typeName, kind, untyped }];
  }),
);

/** Appliances that empty into a drain, by the predefined type of IfcElectricAppliance. */
const drainingAppliances = new Set(['DISHWASHER', 'WASHINGMACHINE', 'FREESTANDINGWATERCOOLER']);
/** The same by name, where the predefined type says nothing: washers of clothes and dishes in nine languages. */
const drainingNames =
  /\bwash|dish ?wash|laundry machine|waschmaschine|sp(?:ü|ue)lmaschine|geschirrsp|lave[- ]?linge|lave[- ]?vaisselle|wasautomaat|wasmachine|vaatwas|lavadora|lavavajillas|lavatrice|lavastoviglie|lavar roupa|lavar lou|tvättmaskin|diskmaskin|vaskemaskin|oppvask|opvask|pralk|zmywark/i;

export function drains(predefinedType: string | null, texts: readonly (string | null | undefined)[]): boolean {
  if (predefinedType !== null && predefinedType !== 'USERDEFINED') return drainingAppliances.has(predefinedType);
  return texts.some((text) => text != null && drainingNames.test(text));
}
