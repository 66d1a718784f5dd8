#include "core/file/worksheet_file.hpp"
