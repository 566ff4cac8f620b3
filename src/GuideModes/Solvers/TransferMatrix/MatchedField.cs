namespace GuideModes.Solvers.TransferMatrix;

/// <summary>The two sweeps of a mode joined into one field, of size about 1 where they meet.</summary>
internal sealed class MatchedField
{
    private readonly Sweep _sweep;
    private readonly int _match;
    private readonly double _leftLog;
    private readonly double _rightLog;
    private readonly double _rightFactor;

    private MatchedField(Sweep sweep, int match, FieldState left, FieldState right, double scale)
    {
        _sweep = sweep;
        _match = match;
        var size = Math.Sqrt(left.Amplitude(scale));
        _leftLog = left.Log + Math.Log(size);
        _rightLog = right.Log;
        // The multiple of the right solution that meets the left one best, in value and slope together.
        var overlap = left.Value * right.Value + left.Slope * right.Slope / (scale * scale);
        _rightFactor = overlap / right.Amplitude(scale) / size;
        Norm = left.Norm / (size * size) + right.Norm * _rightFactor * _rightFactor;
    }

    /// <summary>∫u² dx over the whole line, in µm.</summary>
    public double Norm { get; }

    /// <summary>Sweeps from both ends at the mode's energy; the states stay valid until the sweep is used again.</summary>
    public static MatchedField Join(Sweep sweep, ModeSearch.Found found)
    {
        var (right, _) = sweep.FromSubstrate(found.Energy, found.Match);
        var (left, _) = sweep.FromCover(found.Energy, found.Match);
        return new(sweep, found.Match, left, right, found.Scale);
    }

    /// <summary>The state at a step's start, and the logarithm of what it is to be multiplied by.</summary>
    public (FieldState State, double Log) At(int step)
    {
        var state = _sweep.States[step];
        if (step <= _match) return (state, state.Log - _leftLog);
        return (state with { Value = state.Value * _rightFactor, Slope = state.Slope * _rightFactor }, state.Log - _rightLog);
    }
}
