namespace GuideModes.Solvers.TransferMatrix;

/// <summary>
/// A solution of u″ = (V − E)u at one point: value, slope and the ∫u² gathered on the way from its own end medium, all to be
/// multiplied by exp <see cref="Log"/> (the integral by its square).
/// </summary>
internal readonly record struct FieldState(double Value, double Slope, double Norm, double Log)
{
    /// <summary>The decaying solution at the edge of a uniform medium with decay rate γ per µm; +1 grows with x, −1 falls.</summary>
    public static FieldState Decaying(double gamma, int direction) =>
        new(1, direction * gamma, gamma > 0 ? 0.5 / gamma : 0, 0);

    /// <summary>The size of the state, slopes weighed by a length.</summary>
    public double Amplitude(double scale) => Value * Value + Slope * Slope / (scale * scale);

    /// <summary>The same state held by numbers of ordinary size.</summary>
    public FieldState Rescaled()
    {
        var size = Math.Abs(Value) + Math.Abs(Slope);
        if (size is > 1e-60 and < 1e60 || size == 0) return this;
        var inverse = 1 / size;
        return new(Value * inverse, Slope * inverse, Norm * inverse * inverse, Log + Math.Log(size));
    }
}
