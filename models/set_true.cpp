#include "models/set_true.h"

namespace focalframe::models {

OpticalMotion against(OpticalMotion m, const OpticalMotion& set) {
  m.v -= set.v;
  m.w -= set.w;
  m.turn -= set.turn;
  m.along -= set.along;
  m.receiver -= set.receiver;
  m.vertex -= set.vertex;
  m.module_turn -= set.module_turn;
  m.beside_drive -= set.beside_drive;
  m.encoder -= set.encoder;
  return m;
}

}  // namespace focalframe::models
