// The plant file people start from: every section explained, every line valid as it stands.
#include "ionledger/report.hpp"

namespace ionledger {

std::string starter_plant_file() {
  return R"(# A plant file. Change the numbers to yours; take out what the laboratory did not measure.
# Every quantity is written with its unit. The mill below is invented.

title = "Quillmere board mill, well water"

# "ppm" is refused until you say what it means here:
# ppm_means = "mg/L"

[model]
# How activity coefficients are computed; "ionledger models" lists what there is. This is the default.
activity = "truesdell-jones"

[stream]
temperature = "18 degC"           # of the water in the plant
pH = "7.62 at 25 degC"            # as measured; leave it out, and the charge balance gives it
flow = "42 m3/h"
# conductivity = "780 uS/cm"      # at 25 degC; checks the ion balance
# density = "0.998 kg/L"          # only if measured; otherwise it is computed
# pressure = "1.013 bar"

[analysis]
# What the laboratory reported, in its own units: mg/L, ug/L, mmol/L, meq/L, mg/kg, mol/kg, hardness
# degrees ... Where one number could mean two things, say "as": "212 mg/L as CaCO3".
calcium    = "96 mg/L"
magnesium  = "0.62 mmol/L"
sodium     = { value = "40 mg/L", uncertainty = "3 %" }
potassium  = "4.7 mg/L"
alkalinity = "212 mg/L as CaCO3"
chloride   = "1.75 meq/L"
sulfate    = "84 mg/L"
nitrate    = "2.8 mg/L as N"
silica     = "14 mg/L as SiO2"

[balance]
# What gives way so that the charges balance: a constituent such as "sodium", "pH" (then leave the
# measured pH out), or "nothing": the imbalance is reported and stays.
closed_by = "nothing"
)";
}

}  // namespace ionledger
