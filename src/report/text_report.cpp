// The terminal report: verdict first, then what it rests on, the evidence last.
#include <cmath>
#include <cstddef>
#include <set>

#include "ionledger/report.hpp"
#include "report/number_text.hpp"
#include "report/terminal_text.hpp"
#include "report/text_page.hpp"
#include "report/text_sections.hpp"
#include "report/text_table.hpp"

namespace ionledger {
namespace {

struct Verdict {
  std::string text;
  Ink ink = Ink::plain;
};

Verdict verdict_on_analysis(const AssessedState& state) {
  if (balance_was_spent_on_ph(state)) {
    return {"not tested: the charge balance was used to find the pH", Ink::watch};
  }
  const std::string gap = signed_text(state.reported_imbalance_percent, 2) + " %, accepted ±" +
                          fixed_text(state.accepted_imbalance_percent, 2) + " %";
  if (is_accepted(state.reported_imbalance_percent, state.accepted_imbalance_percent)) {
    return {"balances: " + gap, Ink::plain};
  }
  return {"does not balance: " + gap + "; find out why first", Ink::alarm};
}

std::string with_index(const MineralLine& mineral) {
  return mineral.mineral + " (" + signed_text(mineral.saturation_index, 2) + ")";
}

Verdict verdict_on_scale(const AssessedState& state) {
  std::vector<MineralLine> forming, near;
  const MineralLine* nearest = nullptr;
  for (const MineralLine& mineral : state.minerals) {
    if (!mineral.is_common_scale) continue;
    const Saturation saturation = saturation_of(mineral);
    if (saturation == Saturation::would_form) forming.push_back(mineral);
    if (saturation == Saturation::near) near.push_back(mineral);
    if (nearest == nullptr && saturation == Saturation::dissolves) nearest = &mineral;
  }
  if (!forming.empty()) {
    std::string text = with_index(forming[0]) + " would form";
    if (forming.size() > 1) text += ", then " + with_index(forming[1]);
    if (forming.size() > 2) text += " and " + std::to_string(forming.size() - 2) + " more";
    return {text, Ink::alarm};
  }
  if (!near.empty())
    return {with_index(near[0]) + " is near saturation; nothing is past it", Ink::watch};
  if (nearest != nullptr) return {"nothing would form; the nearest is " + with_index(*nearest)};
  return {"no common scale can form from what was reported"};
}

Verdict verdict_on_care(const AssessedState& state) {
  if (state.cautions.empty()) return {"the calculation raised no caution"};
  std::string subjects;
  std::set<std::string> named;
  for (const Caution& caution : state.cautions) {
    if (named.insert(caution.about).second) {
      subjects += (subjects.empty() ? "" : ", ") + caution.about;
    }
  }
  return {counted(state.cautions.size(), "caution", "cautions") + " below: " + subjects,
          Ink::watch};
}

void print_title(TextPage& page, const Assessment& assessment, const AssessedState& state) {
  page.line({{assessment.title.empty() ? "Untitled stream" : assessment.title, Ink::strong}});
  std::string name = state.name;
  for (char& c : name) c = c == '_' ? ' ' : c;
  page.line({{name + ", " + plain_text(state.temperature_degc) + " °C, " +
                  plain_text(state.pressure_bar) + " bar",
              Ink::quiet}});
  page.rule(true);
  const auto one_line = [&](const std::string& label, const Verdict& verdict) {
    page.line({{padded_right("  " + label, 13), Ink::quiet}, {verdict.text, verdict.ink}});
  };
  one_line("Analysis", verdict_on_analysis(state));
  one_line("Scale", verdict_on_scale(state));
  one_line("Take care", verdict_on_care(state));
}

std::string ph_text(const AssessedState& state) {
  std::string text = fixed_text(state.ph, 2);
  if (!state.measured_ph) return text + ", from " + state.ph_from;
  const double degc = state.measured_ph_degc.value_or(state.temperature_degc);
  const bool is_measured_here = plain_text(degc) == plain_text(state.temperature_degc);
  const std::string measured =
      fixed_text(*state.measured_ph, 2) + " measured at " + plain_text(degc) + " °C";
  if (state.ph_from != "measured") return text + ", from " + state.ph_from + "; " + measured;
  return is_measured_here ? text + ", measured" : text + " at this temperature; " + measured;
}

/// In equivalents, and as the laboratory wrote it or would have written it.
std::string alkalinity_text(const AssessedState& state) {
  std::string text = significant_text(state.alkalinity_eq_per_kg * 1e3) + " meq/kg of water";
  for (const TotalLine& total : state.totals) {
    if (total.constituent != "alkalinity") continue;
    text += ", " + significant_text(total.mg_per_l) + " mg/L as " + total.as_formula;
  }
  return text;
}

std::string conductivity_text(const AssessedState& state) {
  const auto value = [](const std::optional<double>& us_cm) {
    return us_cm ? significant_text(*us_cm, 4) + " µS/cm" : std::string("not known");
  };
  return value(state.conductivity_us_cm) + " at 25 °C from the ions, " +
         value(state.conductivity_at_temperature_us_cm) + " as the water is; " +
         (state.measured_conductivity_us_cm
              ? plain_text(*state.measured_conductivity_us_cm) + " µS/cm measured"
              : "not measured");
}

void print_essentials(TextPage& page, const AssessedState& state) {
  page.heading("Essentials");
  page.labelled("pH", ph_text(state), Ink::strong);
  page.labelled("ionic strength", significant_text(state.ionic_strength) + " mol/kg of water");
  page.labelled("water activity", fixed_text(state.water_activity, 4));
  page.labelled("density", fixed_text(state.density_kg_per_l, 4) + " kg/L");
  page.labelled("alkalinity", alkalinity_text(state));
  page.labelled("conductivity", conductivity_text(state));
  page.labelled("dissolved solids",
                significant_text(state.tds_mg_per_l, 4) + " mg/L; dried at 180 °C " +
                    significant_text(state.residue_180_mg_per_l, 4));
}

void print_totals(TextPage& page, const AssessedState& state) {
  if (state.totals.empty()) return;
  page.heading("What the laboratory wrote", "alkalinity and hardness in meq/kg");
  TextTable table({{"constituent", Align::left, true},
                   {"as written", Align::left, true},
                   {"mmol/kg", Align::right},
                   {"mg/L", Align::right},
                   {"as"}});
  std::size_t derived = 0;
  for (const TotalLine& total : state.totals) {
    const bool is_derived = total.as_written.empty();
    derived += is_derived ? 1 : 0;
    table.row({{total.constituent},
               {is_derived ? "(derived)" : total.as_written, is_derived ? Ink::quiet : Ink::plain},
               {significant_text(total.mol_per_kg * 1e3, 4)},
               {significant_text(total.mg_per_l, 4)},
               {total.as_formula, Ink::quiet}});
  }
  table.print(page);
  if (derived > 0) {
    page.paragraph(
        "Derived: follows from the other values, the pH or the charge balance.", 2, Ink::quiet);
  }
}

void print_record(TextPage& page, const Assessment& assessment, const Certificate& certificate) {
  page.heading("Record");
  page.labelled("chemistry", assessment.chemistry);
  page.labelled("activities",
                assessment.activity_model + ": " + assessment.activity_title +
                    "; trusted by its authors up to " +
                    significant_text(assessment.max_ionic_strength, 2) + " mol/kg");
  std::string how = certificate.converged ? "converged" : "not converged";
  how +=
      " in " + counted(std::size_t(std::max(certificate.iterations, 0)), "iteration", "iterations");
  how += " on the " + certificate.path + " path; relative residuals: balance " +
         scientific_text(certificate.worst_balance_residual, 1);
  if (!certificate.worst_balance.empty()) how += " (" + certificate.worst_balance + ")";
  how += ", charge " + scientific_text(certificate.charge_residual, 1) + ", ionic strength " +
         scientific_text(certificate.ionic_strength_residual, 1);
  page.labelled("solution", how, certificate.converged ? Ink::plain : Ink::alarm);
  page.paragraph(assessment.digest, 2, Ink::quiet);
}

}  // namespace

void print_cautions(TextPage& page, const std::vector<Caution>& cautions, bool has_authority) {
  if (cautions.empty() && !has_authority) return;
  page.heading("Cautions");
  for (const Caution& caution : cautions) {
    page.line({{"  " + caution.about, Ink::watch}});
    page.paragraph(caution.says, 4);
  }
  if (has_authority) {
    page.paragraph("Local codes, permits and a licensed engineer's judgement come first.");
  }
}

std::string text_report(const Assessment& assessment, const TextStyle& style) {
  TextPage page(style);
  for (std::size_t i = 0; i < assessment.states.size(); ++i) {
    const AssessedState& state = assessment.states[i];
    const bool is_last = i + 1 == assessment.states.size();
    // A step says what it changes; the whole of it is one option away.
    const bool in_full = i == 0 || style.all;
    if (i > 0) page.blank();
    print_title(page, assessment, state);
    if (i == 0 && !is_last) print_train(page, assessment.states);
    print_step(page, state);
    print_essentials(page, state);
    if (in_full) print_ledger(page, state);
    print_minerals(page, state);
    if (in_full) {
      print_species(page, state);
      print_gases(page, state);
      print_indices(page, state);
      print_totals(page, state);
    }
    print_cautions(page, state.cautions, is_last);
    if (is_last || style.all) print_record(page, assessment, state.certificate);
  }
  if (assessment.states.size() > 1 && !style.all) {
    page.paragraph(
        "Left out: ledger, species, gases and indices after each step. Add --all to see them.",
        2,
        Ink::quiet);
  }
  return std::move(page).text();
}

}  // namespace ionledger
