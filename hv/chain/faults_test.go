package chain_test

import (
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/document/faulttest"
)

// whole is a chain with nearly every table, to which the documents below add.
const whole = `format = 1
[drive]
frequency = "38 kHz"
peak = "1.75 kV"
[multiplier]
polarity = "negative"
stages = 3
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = "1 nF"
[divider]
upper.value = "1 Gohm"
lower.value = "1 Mohm"
[gun]
emission = "60 uA"
[heater]
supply = "dc"
`

// faulty are documents whose comments say what is wrong across their keys.
var faulty = map[string]string{
	"dispositions": whole + `
[[accepted]]
rule = "spacing.corona"
disposition = "measured" # FAULT 15 accepted: measured, without record; give record # FAULT 15 accepted: without measurement
name = "A. N. Other"
reason = "it is quiet"
[[accepted]]
rule = "drive.headroom"
subject = "drive"
disposition = "waved through" # FAULT 15 word: not an accepted word
name = "A. N. Other"
reason = "it holds"
[[accepted]] # FAULT 1 accepted: a second disposition of the same point; keep one; the first is on line
rule = "drive.headroom"
subject = "drive"
disposition = "accepted"
name = "A. N. Other"
reason = "it holds"
[[accepted]] # FAULT 1 missing: accepted.name # FAULT 1 missing: accepted.reason
rule = "drive.headroom"
disposition = "accepted"
`,
	"nothing to review": `format = 1  # FAULT 1 purpose: there is nothing to review; describe [drive] and [multiplier], a [[spacing]], a [[feedthrough]] or a [[field]]
#^ a site is no chain
[site]
altitude = "240 m"
[drive]
frequency = "38 kHz"
peak = "1 kV"
`,
	"no format": `title = "x" # FAULT 1 missing: format: not given
[[spacing]]
name = "gap"
medium = "air"
voltage = "20 kV"
`,
	"beams of the wrong kind": whole + `
[bias]
kind = "self"
resistor.value = "2 Mohm"
lowest = "100 V"           # FAULT 10 adjustment: bias.lowest: self-bias is adjusted by its resistor; give lowest_resistance and highest_resistance
lowest_resistance = "5 Mohm"
highest_resistance = "2 Mohm" # FAULT 22 adjustment: bias.highest_resistance: the upper end is not above the lower one of 5 MΩ
[beam]
mass_number = 40           # FAULT 15 beam: beam.mass_number: only an ion has such a key
charge_number = 2          # FAULT 17 beam: beam.charge_number: only an ion has such a key
from = "cathod"            # FAULT 8 beam: beam.from: "cathod" is no node of this chain
[beam.measurement]         # FAULT 1 beam: beam.measurement: how a record is to be read, and no record; give measured_ripple
probe_factor = 10
`,
	"ions from a gun": whole + `
[beam]
particle = "ion"           # FAULT 12 beam: beam.particle: ions without a mass; give mass_number # FAULT 12 beam: beam.particle: ions from an electron gun; leave [gun] out
`,
	"another format": `format = 2  # FAULT 10 range: format: 2 is out of range; accepted: 1
[[spacing]]
name = "gap"
medium = "air"
voltage = "20 kV"
`,
	"without multiplier": `format = 1
[regulation]    # FAULT 1 multiplier: regulation: this hangs on a multiplier, and there is none # FAULT 1 regulation: regulation without a divider
set = "20 kV"
[[filter]]      # FAULT 1 multiplier: filter: this hangs on a multiplier
resistor.value = "1 Mohm"
[[load]]        # FAULT 1 multiplier: load: this hangs on a multiplier
name = "a"
at = "output"
current = "1 uA"
[gun]           # FAULT 1 multiplier: gun: this hangs on a multiplier
[[spacing]]
name = "gap"
from = "output" # FAULT 8 spacing: spacing.from: without a multiplier nothing tells the voltage between two nodes other than mains and ground; give voltage
to = "ground"
medium = "air"
[[field]]
name = "lens"
[[field.electrodes]]
name = "a"
node = "cathode" # FAULT 8 electrode: field.electrodes.node: without a multiplier nothing tells the voltage of a node
profile = [{ from = ["1 mm", "0 mm"] }, { to = ["2 mm", "0 mm"] }]
`,
	"touchable without multiplier": `format = 1
[access]
touchable = ["ground", "divider.tap"] # FAULT 13 node: access.touchable: "divider.tap" is no node of this chain; nodes: ground, mains
[[spacing]]
name = "gap"
medium = "air"
voltage = "20 kV"
`,
	"of another form": `format = 1
drive = 3        # FAULT 9 form: drive: the number 3 where a table is wanted
[[multiplier]]   # FAULT 1 form: multiplier: there can be only one; write [multiplier]
polarity = "negative"
stages = 3
coupling_capacitor.value = "1 nF"
smoothing_capacitor = "1 nF" # FAULT 23 form: multiplier.smoothing_capacitor: text "1 nF" where a table is wanted
[load]           # FAULT 1 form: load: one table where there can be several; write [[load]]
name = "a"
at = "stage.4"   # FAULT 6 node: load.at: "stage.4" is no node
current = "1 uA"
`,
	"without drive": `format = 1
[multiplier]    # FAULT 1 multiplier: multiplier: a multiplier without a drive; describe [drive]
polarity = "negative"
stages = 3
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = "1 nF"
`,
	"a misspelt table is not an absent one": `format = 1
[drvie]         # FAULT 1 unknown: drvie: there is no such table; was "drive" meant?
frequency = "38 kHz"
peak = "1 kV"
[multiplier]
polarity = "negative"
stages = 3
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = "1 nF"
[regulation]
set = "9 kV"
[devider]       # FAULT 1 unknown: devider: there is no such table; was "divider" meant?
upper.value = "1 Gohm"
lower.valu = "1 Mohm" # FAULT 1 unknown: divider.lower.valu: there is no such key; was "value" meant?
`,
	"an illegible line hides what it held": `format = 1
[drive]
frequency = "38 kHz"
peak = "1 kV"
[multiplier]
polarity = "negative"
stages = three  # FAULT 10 syntax: multiplier.stages: three stands without quotes
coupling_capacitor.value = ["1 nF", "2 nF"]
smoothing_capacitor.value = "1 nF"
[regulation]
set = "9 kV"
[???]           # FAULT 1 syntax: this header cannot be read
upper.value = "1 Gohm"
[[load]]
name = "monitor"
at = "divider.tap"
current = 10 uA # FAULT 11 syntax: load.current: 10 uA stands without quotes
`,
	"stages": `format = 1
[drive]
frequency = "38 kHz"
peak = "1 kV"
[multiplier]
polarity = "negative"
stages = 3
coupling_capacitor  = { value = ["1 nF", "2 nF"], value_at_voltage = "1 nF" } # FAULT 33 stages: multiplier.coupling_capacitor.value: 2 values for 3 stages; give one value, or 3, from the grounded end
smoothing_capacitor = { value = ["1 nF", "2 nF", "3 nF"], value_at_voltage = ["1 nF", "1 nF", "1 nF", "1 nF"] } # FAULT 78 stages: multiplier.smoothing_capacitor.value_at_voltage: 4 values for 3 stages
[[filter]]
resistor.value = "1 Mohm"
capacitor.value = ["1 nF", "1 nF"] # FAULT 19 stages: filter.capacitor.value: 2 values for one capacitor; give one value
[bias]
kind = "fixed"
voltage = "300 V"
bypass.value = ["1 nF", "1 nF", "1 nF"] # FAULT 16 stages: bias.bypass.value: 3 values for one capacitor
`,
	"drive": `format = 1
[drive]
frequency = "38 kHz"
peak = "1.75 kV"
peak_limit = "1.7 kV" # FAULT 14 drive: drive.peak_limit: the limit is below the peak of 1.75 kV; give the most
unbalance = "0 %"     # FAULT 13 drive: drive.unbalance: a half-wave multiplier has one drive, not two halves; leave it out, or write topology = "symmetrical"
[multiplier]
polarity = "negative"
stages = 3
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = "1 nF"
`,
	"regulation": `format = 1
[drive]
frequency = "38 kHz"
peak = "1.75 kV"
[multiplier]
polarity = "negative"
stages = 3
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = "1 nF"
[regulation]    # FAULT 1 regulation: regulation: regulation without a divider that senses the output; describe [divider]
set = "10 kV"
`,
	"load": whole + `
[[load]]
name = "a"
at = "output"
current = "1 uA"
resistance = "1 Gohm"  # FAULT 14 load: load.resistance: both a current and a resistance; keep one of the two
[[load]]               # FAULT 1 load: load: neither a current nor a resistance; give one
name = "b"
at = "supply"
[[load]]
name = "c"
at = "stage.1"
curent = "1 uA"        # FAULT 1 unknown: load.curent: there is no such key; was "current" meant?
`,
	"self-bias": `format = 1
[drive]
frequency = "38 kHz"
peak = "1.75 kV"
[multiplier]
polarity = "negative"
stages = 3
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = "1 nF"
[bias]                 # FAULT 1 bias: bias: self-bias without a resistor; give resistor
kind = "self"          # FAULT 8 bias: bias.kind: self-bias without a gun whose emission makes it; describe [gun]
fed = "cathode"        # FAULT 7 bias: bias.fed: the emission would not pass the bias resistor: no self-bias arises
voltage = "300 V"      # FAULT 11 bias: bias.voltage: self-bias is made by the emission, not given
`,
	"fixed bias": whole + `
[bias]                 # FAULT 1 bias: bias: a fixed bias without a voltage; give voltage
kind = "fixed"
fed = "cathode"
`,
	"heater": `format = 1
[drive]
frequency = "38 kHz"
peak = "1.75 kV"
[multiplier]
polarity = "negative"
stages = 3
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = "1 nF"
[site]
altitude = "1 m"
[heater]
supply = "ac"          # FAULT 10 heater: heater.supply: an AC heater of unknown frequency; give frequency here or mains_frequency in [site]
`,
	"instruments": whole + `
[[instrument]]         # FAULT 1 instrument: instrument: an instrument that reads no node; give at
name = "a"
resistance = "1 Gohm"
[[instrument]]         # FAULT 1 instrument: instrument: a voltmeter without its resistance; give resistance
name = "b"
at = "outputt"         # FAULT 6 node: instrument.at: "outputt" is no node of this chain; was "output" meant?
[[instrument]]
name = "c"
at = "ground"          # FAULT 6 instrument: instrument.at: both ends on ground; name the node
resistance = "1 Gohm"
[[instrument]]
name = "c"             # FAULT 8 name: instrument.name: a second instrument named "c"; choose another name
reads = "return current"
at = "output"          # FAULT 6 instrument: instrument.at: the current in the return is read at the foot of the multiplier; leave it out
`,
	"names": whole + `
[[load]]
name = "a"
at = "output"
current = "1 uA"
[[load]]
name = "a"             # FAULT 8 name: load.name: a second load named "a"; choose another name; the first is on line 19
at = "output"
current = "1 uA"
[[part]]
name = "a"
kind = "resistor"
from = "output"
to = "tip"
value = "1 kohm"
[[part]]
name = "tip"           # FAULT 8 name: part.name: a part with the name of a node; give it a name of its own
kind = "resistor"
from = "tip"
to = "ground"
value = "1 kohm"
[[part]]
name = "output"        # FAULT 8 name: part.name: a part with the name of a node
kind = "capacitor"
from = "tip"
to = "ground"
value = "1 nF"
[[target]]
name = "anode"
material = "copper"
[[target]]
name = "anode"         # FAULT 8 name: target.name: a second target named "anode"
material = "copper"
[[shield]]
name = "wall"
target = "anode"
layers = []            # FAULT 10 length: shield.layers: an empty list
[[shield]]
name = "wall"          # FAULT 8 name: shield.name: a second shield named "wall"
target = "andoe"       # FAULT 10 target: shield.target: "andoe" is no described target; was "anode" meant? targets: anode
layers = [{ material = "lead", thickness = "1 mm" }]
[[spacing]]
name = "gap"
voltage = "1 kV"
medium = "air"
[[spacing]]
name = "gap"           # FAULT 8 name: spacing.name: a second spacing named "gap"
voltage = "1 kV"
medium = "air"
[[field]]
name = "lens"
electrodes = [{ name = "a", node = "ground", profile = [{ from = ["1 mm", "0 mm"] }, { to = ["2 mm", "0 mm"] }] }]
probes = [{ name = "p", at = ["1 mm", "1 mm"] }, { name = "p", at = ["1 mm", "2 mm"] }] # FAULT 59 name: field.probes.name: a second probe named "p"
[[field]]
name = "lens"          # FAULT 8 name: field.name: a second field named "lens"
electrodes = [{ name = "a", node = "ground", profile = [{ from = ["1 mm", "0 mm"] }, { to = ["2 mm", "0 mm"] }] }]
`,
	"shield without targets": `format = 1
[[spacing]]
name = "gap"
voltage = "1 kV"
medium = "air"
[[shield]]
name = "wall"
target = "anode"       # FAULT 10 target: "anode" is no described target; describe it as a [[target]]
layers = [{ material = "lead", thickness = "1 mm" }]
`,
	"nodes": whole + `
[[load]]
name = "a"
at = "Output"          # FAULT 6 node: load.at: "Output" is no node of this chain; was "output" meant? nodes: ground, mains,
current = "1 uA"
[[bleeder]]
at = "stage.4"         # FAULT 6 node: bleeder.at: "stage.4" is no node of this chain; was "stage.1" meant?
resistor.value = "1 Gohm"
[[bleeder]]
at = "foot"            # FAULT 6 node: bleeder.at: both ends on ground; name the node
resistor.value = "1 Gohm"
[access]
touchable = ["divider.tap", "rod", "cathodes"] # FAULT 13 node: access.touchable: "rod" is no node of this chain; nodes: # FAULT 13 node: "cathodes" is no node
[[spacing]]
name = "gap"
from = "filter.1"      # FAULT 8 node: spacing.from: "filter.1" is no node
to = "earth"           # FAULT 6 node: spacing.to: "earth" is no node
also = ["stage.2", "coupling.a.1"] # FAULT 8 node: spacing.also: "coupling.a.1" is no node
medium = "air"
[[spacing]]
name = "other gap"
from = "anode"         # made by a part below
to = "ground"
medium = "air"
[[field]]
name = "lens"
electrodes = [{ name = "a", node = "catode", profile = [{ from = ["1 mm", "0 mm"] }, { to = ["2 mm", "0 mm"] }] }] # FAULT 36 node: field.electrodes.node: "catode" is no node of this chain; was "cathode" meant?
[[part]]
name = "b"
kind = "resistor"
from = "Anode"
to = "anode"
value = "1 kohm"
[[part]]
name = "c"
kind = "resistor"
from = "Cathode"       # FAULT 8 node: part.from: "Cathode" differs by upper and lower case only from a node; write "cathode"
to = "stage.9"         # FAULT 6 node: part.to: "stage.9" is no node of this chain, and the name is kept for one
value = "1 kohm"
[[part]]
name = "d"
kind = "resistor"
from = "cathode"
to = "cathode"         # FAULT 6 node: part.to: both ends on the same node
value = "1 kohm"
[[part]]
name = "e"
kind = "resistor"
from = "ouput"         # FAULT 8 node: part.from: "ouput" is no node but nearly one, and no other part is on it; write "output"
to = "output2"
value = "1 kohm"
[[part]]
name = "f"
kind = "resistor"
from = "output2"
to = "ground"
value = "1 kohm"
`,
	"sensed node": `format = 1
[drive]
frequency = "38 kHz"
peak = "1.75 kV"
[multiplier]
polarity = "negative"
stages = 3
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = "1 nF"
[divider]
senses = "divider.tap" # FAULT 10 node: divider.senses: the divider cannot sense divider.tap
upper.value = "1 Gohm"
lower.value = "1 Mohm"
`,
	"sensed node that is not there": `format = 1
[drive]
frequency = "38 kHz"
peak = "1.75 kV"
[multiplier]
polarity = "negative"
stages = 3
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = "1 nF"
[divider]
senses = "cathode"     # FAULT 10 node: divider.senses: "cathode" is no node of this chain; nodes: ground
upper.value = "1 Gohm"
lower.value = "1 Mohm"
`,
	"sharper electrodes": whole + `
[[spacing]]
name = "by side"
from = "cathode"
to = "ground"
medium = "air"
sharper_electrode = "negative" # FAULT 21 spacing: spacing.sharper_electrode: a polarity where the nodes have one; give from or to
shape = { kind = "sphere-plane", radius = "5 mm" }
[[spacing]]
name = "by polarity"
voltage = "20 kV"
medium = "air"
sharper_electrode = "from" # FAULT 21 spacing: spacing.sharper_electrode: a side of a spacing that is between no nodes; give positive or negative
shape = { kind = "sphere-plane", radius = "5 mm" }
[[spacing]]
name = "no shape, and none is needed"
voltage = "20 kV"
medium = "air"
sharper_electrode = "negative"
[[spacing]]
name = "alike"
voltage = "20 kV"
medium = "air"
sharper_electrode = "negative" # FAULT 21 spacing: spacing.sharper_electrode: the electrodes of a shape of kind "plates" are alike
shape = { kind = "plates" }
[[spacing]]
name = "elsewhere"
voltage = "20 kV"
medium = "vacuum"
sharper_electrode = "negative" # FAULT 21 spacing: spacing.sharper_electrode: a key of spacings in air, not in vacuum
shape = { kind = "point-plane", tip_radius = "1 mm" }
`,
	"spacings": whole + `
[[spacing]]
name = "a"
from = "cathode"
to = "ground"
voltage = "20 kV"      # FAULT 11 spacing: spacing.voltage: both nodes and a voltage; keep from and to, or voltage
medium = "air"
[[spacing]]            # FAULT 1 spacing: spacing: neither nodes nor a voltage; give from and to, or voltage
name = "b"
medium = "air"
[[spacing]]
name = "c"
from = "cathode"       # FAULT 8 spacing: spacing.from: from without to
medium = "air"
[[spacing]]
name = "d"
to = "ground"          # FAULT 6 spacing: spacing.to: to without from
medium = "air"
[[spacing]]
name = "e"
from = "cathode"
to = "cathode"         # FAULT 6 spacing: spacing.to: both sides on the same node
medium = "air"
clearance = "60 mm"
creepage = "50 mm"     # judged by a rule, not here
[[spacing]]
name = "f"
voltage = "20 kV"
also = ["stage.1"]     # FAULT 8 spacing: spacing.also: further nodes to a spacing that is between none
medium = "solid"
finish = "polished"    # FAULT 10 spacing: spacing.finish: a key of spacings in vacuum, not in solid; leave it out
tested_voltage = "3 kV" # FAULT 18 spacing: spacing.tested_voltage: a tested voltage without the tested length
tested_thickness = "3 mm" # FAULT 20 spacing: spacing.tested_thickness: a tested thickness without the strength
`,
	"shapes": `format = 1
[[spacing]]
name = "a"
voltage = "20 kV"
medium = "air"
clearance = "60 mm"    # FAULT 13 shape: spacing.clearance: the radii of the shape leave a gap of 59 mm; the clearance is the outer less the inner radius, within 1 %
shape = { kind = "coaxial", inner_radius = "3 mm", outer_radius = "62 mm" }
[[spacing]]
name = "b"
voltage = "20 kV"
medium = "air"
clearance = "60 mm"
shape = { kind = "concentric spheres", inner_radius = "3 mm", outer_radius = "62.5 mm" }
[[spacing]]
name = "c"
voltage = "20 kV"
medium = "air"
shape = { kind = "coaxial", inner_radius = "3 mm", outer_radius = "3 mm" } # FAULT 67 shape: spacing.shape.outer_radius: the outer radius is not larger than the inner one
[[spacing]]
name = "d"
voltage = "20 kV"
medium = "air"
shape = { kind = "coaxial", radius = "3 mm" } # FAULT 9 shape: a shape of kind "coaxial" without inner_radius; give inner_radius # FAULT 9 shape: without outer_radius # FAULT 38 shape: spacing.shape.radius: no size of a shape of kind "coaxial"; sizes of this kind: inner_radius, outer_radius
[[spacing]]
name = "e"
voltage = "20 kV"
medium = "air"
shape = { kind = "plates", edge_radius = "3 mm", earthed = true } # FAULT 42 shape: no size of a shape of kind "plates"; sizes of this kind: none # FAULT 60 shape: spacing.shape.earthed: only spheres
[[spacing]]
name = "f"
voltage = "20 kV"
medium = "air"
shape = { kind = "point-plane", tip_radius = "300" } # FAULT 46 quantity: spacing.shape.tip_radius: "300": a number without a unit
`,
	"feedthroughs": whole + `
[[feedthrough]]
name = "a"
node = "cathode"
voltage = "20 kV"      # FAULT 11 feedthrough: feedthrough.voltage: both a node and a voltage; keep one of the two
plate_thickness = "3 mm"
pin = { radius = "3 mm" }
hole = { radius = "20 mm", edge_radius = "4 mm" } # FAULT 42 feedthrough: feedthrough.hole.edge_radius: the edge is rounded by more than the plate is thick: 3 mm
sleeve = { material = "alumina", inner_radius = "2.5 mm", outer_radius = "21 mm" } # FAULT 49 feedthrough: feedthrough.sleeve.inner_radius: the pin of 3 mm does not go into the sleeve # FAULT 74 feedthrough: feedthrough.sleeve.outer_radius: the sleeve does not go into the hole of 20 mm
air_side = { length = "60 mm", clearance = "60 mm", creepage = "50 mm" } # FAULT 64 feedthrough: feedthrough.air_side.creepage: the way along the surface is shorter than the clearance of 60 mm
[[feedthrough]]        # FAULT 1 feedthrough: feedthrough: neither a node nor a voltage; give node, or voltage # FAULT 1 feedthrough: feedthrough: air on one side and vacuum on the other, and no sleeve between; describe sleeve
name = "b"
pin = { radius = "3 mm" }
hole = { radius = "3 mm" } # FAULT 19 feedthrough: feedthrough.hole.radius: the hole is not wider than the pin: 3 mm against 3 mm
air_side = { length = "60 mm" }
vacuum_side = { length = "60 mm", tested_voltage = "30 kV" } # FAULT 52 feedthrough: feedthrough.vacuum_side.tested_voltage: a tested voltage without the tested length; give tested_length
[[feedthrough]]
name = "c"
node = "ground"        # FAULT 8 feedthrough: feedthrough.node: pin and plate on the same node; name the node of the pin
pin = { radius = "3 mm" }
hole = { radius = "13 mm" }
sleeve = { material = "alumina", inner_gap = "air", outer_gap = "vacuum", tested_thickness = "1 mm" } # FAULT 46 feedthrough: feedthrough.sleeve.inner_gap: no gap between pin and sleeve to fill # FAULT 65 feedthrough: feedthrough.sleeve.outer_gap: no gap between sleeve and hole to fill # FAULT 94 feedthrough: feedthrough.sleeve.tested_thickness: a tested thickness without the strength
vacuum_side = { length = "60 mm", tested_length = "30 mm" } # FAULT 51 feedthrough: feedthrough.vacuum_side.tested_length: a tested length without the tested voltage
strip = { length = "80 mm" } # FAULT 9 feedthrough: feedthrough.strip: a bared cable without a side in air
[[feedthrough]]        # FAULT 1 feedthrough: feedthrough: a feedthrough without a side; describe air_side, vacuum_side or both
name = "c"             # FAULT 8 name: feedthrough.name: a second feedthrough named "c"
node = "cathod"        # FAULT 8 node: feedthrough.node: "cathod" is no node of this chain
pin = { radius = "3 mm" }
hole = { radius = "13 mm" }
sleeve = { material = "alumina", inner_radius = "8 mm", outer_radius = "8 mm" } # FAULT 72 feedthrough: feedthrough.sleeve.outer_radius: the sleeve has no wall: 8 mm against 8 mm
[[feedthrough]]
name = "d"
voltage = "20 kV"
to = "ground"          # FAULT 6 feedthrough: feedthrough.to: the node of the plate beside a stated voltage
pin = { radius = "3 mm" }
hole = { radius = "13 mm" }
air_side = { length = "60 mm", shape = { kind = "coaxial", radius = "3 mm" } } # FAULT 40 shape: without inner_radius # FAULT 40 shape: without outer_radius # FAULT 69 shape: feedthrough.air_side.shape.radius: no size of a shape
`,
	"feedthrough without multiplier": `format = 1
[[feedthrough]]
name = "a"
node = "cathode"       # FAULT 8 feedthrough: feedthrough.node: without a multiplier nothing tells the voltage of a node
pin = { radius = "3 mm" }
hole = { radius = "13 mm" }
air_side = { length = "60 mm", ribs = { count = 3, depth = "5 mm", width = "4 mm" }, creepage = "40 mm" } # FAULT 97 feedthrough: feedthrough.air_side.creepage: the way over the ribs is shorter than the straight one of 60 mm
`,
	"parts": whole + `
[[part]]               # FAULT 1 part: part: a resistor without a value; give its resistance, as in value = "4.7 Mohm"
name = "a"
kind = "resistor"
from = "output"
to = "tip"
[[part]]
name = "b"
kind = "capacitor"
from = "output"
to = "tip"
value = "22 kohm"      # FAULT 9 part: part.value: "22 kohm": unit "kohm" is a resistance, not a capacitance
[[part]]
name = "c"
kind = "inductor"
from = "output"
to = "tip"
value = "0 H"          # FAULT 9 part: part.value: "0 H" is out of range; accepted: more than 0 H
leakage = "1 nA"       # FAULT 11 part: part.leakage: only a diode has such a key; leave it out
resistance = "1 ohm"   # FAULT 14 part: part.resistance: an inductor has no such key
[[part]]
name = "d"
kind = "varistor"
from = "output"
to = "tip"
value = "1,2 kV"       # FAULT 9 part: part.value: "1,2 kV": a decimal comma
[[part]]               # FAULT 1 part: part: a meter without a resistance; give resistance
name = "e"
kind = "meter"
from = "output"
to = "tip"
value = "10 Mohm"      # FAULT 9 part: part.value: a meter has no value; leave it out
[[part]]
name = "f"
kind = "diode"
from = "output"
to = "tip"
forward_drop = "12 V"
resistance = "40 ohm"
leakage = "1 nA"
`,
	"electrodes": whole + `
[[field]]
name = "lens"
[[field.electrodes]]
name = "a"
node = "cathode"
voltage = "1 kV"       # FAULT 11 electrode: field.electrodes.voltage: both a node and a voltage; keep one of the two
profile = [{ from = ["1 mm", "0 mm"] }, { to = ["2 mm", "0 mm"] }]
[[field.electrodes]]   # FAULT 1 electrode: field.electrodes: neither a node nor a voltage; give one
name = "b"
profile = [{ from = ["1 mm", "0 mm"] }, { to = ["2 mm", "0 mm"] }]
[[field.electrodes]]
name = "c"
node = "cathode"
profile = [{ from = ["1 mm", "0 mm"] }, { to = ["2 mm", "0 mm"] }]
[[field.electrodes]]
name = "c"
node = "cathode"
profile = [{ from = ["1 mm", "1 mm"] }, { to = ["2 mm", "1 mm"] }]
[[field.electrodes]]
name = "c"             # FAULT 8 electrode: field.electrodes.name: another piece of this electrode has another potential
node = "control"
profile = [{ from = ["1 mm", "0 mm"] }, { to = ["2 mm", "0 mm"] }]
`,
	"profiles": `format = 1
[[field]]
name = "lens"
[[field.electrodes]]
name = "arc"
voltage = "0 V"
profile = [
  { from = ["0 mm", "5 mm"] },
  { to = ["12 mm", "5 mm"] },
  { to = ["15 mm", "8 mm"], centre = ["12 mm", "8 mm"], turn = "left" },
]
[[field.electrodes]]
name = "b"
voltage = "0 V"
profile = [
  { to = ["12 mm", "5 mm"] },                                     # FAULT 3 profile: field.electrodes.profile: a profile that starts nowhere # FAULT 10 profile: field.electrodes.profile.to: the first stroke is a point
  { from = ["12 mm", "5 mm"] },                                   # FAULT 3 profile: a stroke that leads nowhere # FAULT 12 profile: field.electrodes.profile.from: a stroke starts where the one before ends
  { to = ["-15 mm", "8 mm"], centre = ["12 mm", "8 mm"] },        # FAULT 10 profile: field.electrodes.profile.to: r is negative # FAULT 39 profile: field.electrodes.profile.centre: an arc without a turn
]
[[field.electrodes]]
name = "c"
voltage = "0 V"
profile = [
  { from = ["0 mm", "5 mm"] },
  { to = ["0 mm", "5 mm"] },                                      # FAULT 10 profile: a line to where it starts; leave the stroke out
  { to = ["15 mm", "8 mm"], turn = "left" },                      # FAULT 36 profile: field.electrodes.profile.turn: an arc without a centre
  { to = ["16 mm", "8 mm"], centre = ["15.2 mm", "8 mm"], turn = "right" }, # FAULT 38 profile: field.electrodes.profile.centre: the ends of the arc are 200 µm and 800 µm from its centre
]
[[field.electrodes]]
name = "d"
voltage = "0 V"
profile = [{ from = ["1 mm", "5 mm"] }]                           # FAULT 12 profile: field.electrodes.profile: a profile of one point; go on with
[[field.dielectrics]]
name = "sleeve"
permittivity = 9.4
profile = [{ from = ["1 mm", "0 mm"] }, { to = ["2 mm", "0 mm"] }, { to = ["2 mm", "1 mm"] }] # FAULT 75 profile: field.dielectrics.profile.to: the outline of a dielectric does not end where it starts
[[field.probes]]
name = "p"
at = ["-1 mm", "0 mm"] # FAULT 6 profile: field.probes.at: r is negative
`,
}

func TestFaultsAcrossKeys(t *testing.T) {
	for name, text := range faulty {
		t.Run(name, func(t *testing.T) {
			_, faults := chain.Read([]byte(text))
			faulttest.Check(t, text, faults)
		})
	}
}

// TestEveryCheckFindsSomething holds the list of checks against the documents of
// these tests, which say the rest.
func TestEveryCheckFindsSomething(t *testing.T) {
	raised := map[document.Code]bool{}
	for _, text := range faulty {
		_, faults := chain.Read([]byte(text))
		for _, f := range faults {
			raised[f.Code] = true
		}
	}
	known := map[document.Code]bool{}
	for _, code := range document.Codes() {
		known[code] = true
	}
	for _, check := range chain.Checks() {
		if !raised[check.Code] {
			t.Errorf("no document raises %s", check.Code)
		}
		if known[check.Code] || check.Says == "" {
			t.Errorf("%s: a code twice, or no words", check.Code)
		}
		known[check.Code] = true
	}
	for code := range raised {
		if !known[code] {
			t.Errorf("%s is in no list", code)
		}
	}
}

func TestWholeIsSound(t *testing.T) { sound(t, whole) }
