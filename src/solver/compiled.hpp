// The solver for many cases of one system at one temperature: tables built once, nothing allocated
// per case when a Workspace and an Outcome are used again.
#pragma once

#include <memory>

#include "solver/solver.hpp"

namespace ionledger::solver {

struct Kernel;
struct WorkspaceParts;

class CompiledSystem {
 public:
  /// Scratch memory of one thread; only for the system that made it.
  class Workspace {
   public:
    explicit Workspace(const CompiledSystem& system);
    ~Workspace();
    Workspace(Workspace&&) noexcept;
    Workspace& operator=(Workspace&&) noexcept;

   private:
    friend class CompiledSystem;
    std::unique_ptr<WorkspaceParts> parts_;
  };

  CompiledSystem(const System& system, const Conditions& conditions);
  ~CompiledSystem();
  CompiledSystem(CompiledSystem&&) noexcept;
  CompiledSystem& operator=(CompiledSystem&&) noexcept;

  /// Same answer as solver::solve, bit for bit, whatever was solved before.
  void solve(const Case& a_case, const Start& start, Workspace& workspace, Outcome& outcome) const;

 private:
  std::unique_ptr<const Kernel> kernel_;
};

}  // namespace ionledger::solver
