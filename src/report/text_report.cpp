// The terminal report: verdict first, then what it rests on, the evidence last.
#include <cmath>
#include <cstddef>

#include "ionledger/report.hpp"
#include "report/essentials.hpp"
#include "report/number_text.hpp"
#include "report/terminal_text.hpp"
#include "report/text_page.hpp"
#include "report/text_sections.hpp"
#include "report/text_table.hpp"
#include "report/verdict.hpp"

namespace ionledger {
namespace {

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

void print_essentials(TextPage& page, const AssessedState& state) {
  page.heading("Essentials");
  Ink ink = Ink::strong;  // of the pH, which comes first
  for (const auto& [name, value] : essentials_of(state)) {
    page.labelled(name, value, ink);
    ink = Ink::plain;
  }
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
