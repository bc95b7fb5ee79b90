package slips

import (
	"cmp"
	"math"
	"slices"

	"beckline/dosing"
)

// Finding is one slip that the evidence points to. Texts are whole sentences or
// questions for an operator, with units.
type Finding struct {
	Code     string
	Field    string          // the reading or setting, by its command-line name; "" for none
	Cause    string          // the likely cause, as a question where it is one
	Evidence string          // what points to it
	Do       string          // what settles it
	Value    dosing.Optional // as given, SI
	Meant    dosing.Optional // what was probably meant, SI
	Weight   float64         // strength of the evidence, in squared standard deviations where it is a matter of numbers
}

// The codes, in the order in which findings of equal weight are listed: danger
// first.
const (
	WrongProduct      = "wrong_product"
	Incompatible      = "incompatible_products"
	PumpWithoutFlow   = "pump_without_flow"
	StrengthDensity   = "strength_density"
	DeliveryUnchecked = "delivery_unchecked"
	AcidOvershoot     = "acid_overshoot"
	LineFrozen        = "line_frozen"
	NoDelivery        = "no_delivery"
	DeliveryOff       = "drawdown_off"
	PumpInManual      = "pump_in_manual"
	ProbeFlat         = "probe_flat"
	ProbeAndGrab      = "probe_and_grab"
	MetersDisagree    = "meters_disagree"
	WeightForVolume   = "weight_for_volume"
	DensityOld        = "density_old"
	StrokeAndSpeed    = "stroke_and_speed"
	DoseBasis         = "dose_basis"
	CoagulantForm     = "coagulant_form"
	DoseDecimal       = "dose_decimal_point"
	FlowUnit          = "flow_unit"
	AlkalinityBasis   = "alkalinity_basis"
	AlkalinityUnit    = "alkalinity_unit"
	TitrantStrength   = "titrant_strength"
	SampleVolume      = "sample_volume"
	CalciumBasis      = "calcium_basis"
	MagnesiumBasis    = "magnesium_basis"
	HardnessDegrees   = "hardness_degrees"
	TemperatureUnit   = "temperature_unit"
	ConductivityUnit  = "conductivity_unit"
	IonBasis          = "ion_basis"
	DecimalPoint      = "decimal_point"
	DigitsSwapped     = "digits_swapped"
	BuretteWrongEnd   = "burette_wrong_end"
	BuretteNotZeroed  = "burette_not_zeroed"
	DuplicatesApart   = "duplicates_apart"
	SampleStood       = "sample_stood"
	BlendAveraged     = "blend_ph_averaged"
	LimeUndissolved   = "lime_not_dissolved"
	ReadingOld        = "reading_old"
	ReadingInFuture   = "reading_in_future"
	CaseReused        = "case_reused"
)

var order = []string{
	WrongProduct, Incompatible, PumpWithoutFlow, StrengthDensity, DeliveryUnchecked, AcidOvershoot, LineFrozen, NoDelivery,
	DeliveryOff, PumpInManual, ProbeFlat, ProbeAndGrab, MetersDisagree, WeightForVolume, DensityOld, StrokeAndSpeed, DoseBasis,
	CoagulantForm, DoseDecimal, FlowUnit, AlkalinityBasis, AlkalinityUnit, TitrantStrength, SampleVolume, CalciumBasis,
	MagnesiumBasis, HardnessDegrees, TemperatureUnit, ConductivityUnit, IonBasis, DecimalPoint, DigitsSwapped, BuretteWrongEnd,
	BuretteNotZeroed, DuplicatesApart, SampleStood, BlendAveraged, LimeUndissolved, ReadingOld, ReadingInFuture, CaseReused,
}

// Codes returns every code that a finding can have.
func Codes() []string { return slices.Clone(order) }

func sortFindings(fs []Finding) {
	slices.SortStableFunc(fs, func(a, b Finding) int {
		return cmp.Or(cmp.Compare(slices.Index(order, a.Code), slices.Index(order, b.Code)), cmp.Compare(a.Field, b.Field))
	})
}

// Confirmation is a value that a person has typed again or otherwise stood by.
// Field is the Finding's; a confirmation without a value holds for whatever the
// finding of that code says.
type Confirmation struct {
	Code  string // "" for every code of the field
	Field string
	Value dosing.Optional // SI
}

// covers tells whether a finding was answered.
func (c Confirmation) covers(f *Finding) bool {
	if c.Code != "" && c.Code != f.Code || c.Field != f.Field || c.Code == "" && c.Field == "" {
		return false
	}
	if !c.Value.Given {
		return c.Code != "" // a field confirmed without its value says nothing
	}
	return f.Value.Given && math.Abs(f.Value.Value-c.Value.Value) <= 1e-9*math.Abs(c.Value.Value)
}
