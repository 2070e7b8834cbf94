# The target barwall_cholmod: SuiteSparse's CHOLMOD with OpenBLAS. Neither ships a package file
# for CMake on every system, so both are looked up here, by the build and by the installed package.
if(NOT TARGET barwall_cholmod)
  find_path(CHOLMOD_INCLUDE_DIR cholmod.h PATH_SUFFIXES suitesparse REQUIRED)
  find_library(CHOLMOD_LIBRARY cholmod REQUIRED)
  find_library(OPENBLAS_LIBRARY openblas REQUIRED)
  mark_as_advanced(CHOLMOD_INCLUDE_DIR CHOLMOD_LIBRARY OPENBLAS_LIBRARY)
  add_library(barwall_cholmod INTERFACE IMPORTED)
  target_include_directories(barwall_cholmod INTERFACE ${CHOLMOD_INCLUDE_DIR})
  target_link_libraries(barwall_cholmod INTERFACE ${CHOLMOD_LIBRARY} ${OPENBLAS_LIBRARY})
endif()
