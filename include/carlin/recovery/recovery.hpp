#pragma once

// Stress, joints, deflections and stiffness of one configuration from solved displacements.
#include "carlin/recovery/deflection.hpp"
#include "carlin/recovery/panels.hpp"
#include "carlin/recovery/stage.hpp"
#include "carlin/recovery/stiffness.hpp"
#include "carlin/recovery/stress.hpp"
