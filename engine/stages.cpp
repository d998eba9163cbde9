#include "engine/stages.hpp"

namespace stillshed {

StageProfile stage_profile(const Mixture& mixture, double pressure_Pa, const Composition& pot, int stages) {
  StageProfile profile;
  profile.status = Status::complete;
  profile.x.push_back(pot);
  double guess_K = 0.0;
  for (int stage = 0; stage < stages; ++stage) {
    const BubblePoint boiling = bubble_point(mixture, profile.x.back(), pressure_Pa, guess_K);
    if (boiling.status != Status::complete) {
      profile.status = Status::undecided;
      return profile;
    }
    guess_K = boiling.temperature_K;
    profile.x.push_back(boiling.y);
  }
  return profile;
}

}  // namespace stillshed
